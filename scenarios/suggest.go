package scenarios

import (
	"slices"
	"strings"
	"unicode/utf8"

	"github.com/agnivade/levenshtein"
)

const longestWord = 64 // runes; longer words are not compared

// nearest returns the word spelled most like w, the first of equals; "" when none has much in common with it.
func nearest(w string, words []string) string {
	if utf8.RuneCountInString(w) > longestWord {
		return ""
	}
	low := strings.ToLower(w)
	runes := utf8.RuneCountInString(w)
	best, least := "", 2+runes/4-runes/10 // one slip in three letters, two in four: "boer" for bore
	for _, word := range words {
		if len(word) > longestWord*4 {
			continue
		}
		if d := levenshtein.ComputeDistance(low, strings.ToLower(word)); d < least {
			best, least = word, d
		}
	}
	if best != "" || len(low) < 3 {
		return best
	}
	for _, word := range words { // "dia" for diameter
		if strings.HasPrefix(strings.ToLower(word), low) {
			return word
		}
	}
	return ""
}

// slipped reports whether a word is another with a letter missing, too many, wrong or in another's place; long ones may have two such slips.
func slipped(w, word string) bool {
	n := utf8.RuneCountInString(w)
	d := levenshtein.ComputeDistance(strings.ToLower(w), strings.ToLower(word))
	return d <= 1+n/8 || d == 2 && sameLetters(w, word)
}

func sameLetters(a, b string) bool {
	x, y := []rune(strings.ToLower(a)), []rune(strings.ToLower(b))
	slices.Sort(x)
	slices.Sort(y)
	return slices.Equal(x, y)
}

// didYouMean makes a hint of the nearest word, or of the whole list when it is short.
func didYouMean(w string, words []string) string {
	if near := nearest(w, words); near != "" {
		return "did you mean " + near + "?"
	}
	return oneOf(words)
}

const (
	fewWords  = 6  // words that are all listed, however near one of them is
	shortList = 24 // words that are still listed in a hint
)

// oneOf lists the words to choose from.
func oneOf(words []string) string {
	switch {
	case len(words) == 0 || len(words) > shortList:
		return ""
	case len(words) == 1:
		return "write " + words[0]
	}
	return "one of " + strings.Join(words, ", ")
}
