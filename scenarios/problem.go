package scenarios

import (
	"cmp"
	"fmt"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"headfall/network"
)

// Problem is one fault of a file, with all that is needed to show it.
type Problem struct {
	File   string
	At     network.Place
	Says   string // what is wrong
	Hint   string // how to write it; may be empty
	Source string // the line of the file
	Width  int    // runes that the caret underlines
}

// Error returns place, fault, source line, caret and hint.
func (p Problem) Error() string {
	var b strings.Builder
	b.WriteString(p.File)
	if p.At.Line > 0 {
		fmt.Fprintf(&b, ":%d:%d", p.At.Line, p.At.Column)
	}
	b.WriteString(": " + p.Says)
	if p.Source != "" && p.At.Line > 0 {
		text, column, width := window(p.Source, p.At.Column, p.Width)
		number := fmt.Sprint(p.At.Line)
		blank := strings.Repeat(" ", len(number))
		fmt.Fprintf(&b, "\n  %s | %s\n  %s | %s%s", number, text, blank, strings.Repeat(" ", column-1), strings.Repeat("^", width))
	}
	if p.Hint != "" {
		b.WriteString("\n  hint: " + p.Hint)
	}
	return b.String()
}

const (
	windowWidth  = 140 // runes of a source line that are shown
	windowBefore = 60  // of these before the caret, where a line is longer
)

// window cuts a piece out of a long line around the caret and makes it printable; it returns the piece and where the caret stands in it.
func window(line string, column, width int) (text string, at, wide int) {
	runes := []rune(strings.ToValidUTF8(line, "?"))
	column = min(max(column, 1), len(runes)+1)
	from, to := 0, len(runes)
	if to > windowWidth {
		from = max(0, min(column-1-windowBefore, to-windowWidth))
		to = min(to, from+windowWidth)
	}
	cut := slices.Clone(runes[from:to])
	for i, r := range cut {
		switch {
		case unicode.IsControl(r):
			cut[i] = ' '
		case unicode.Is(unicode.Cf, r): // of no width, or turning the line round: shown, so that the caret stands right
			cut[i] = '·'
		}
	}
	at = column - from
	if from > 0 {
		cut[0] = '…'
	}
	if to < len(runes) {
		cut[len(cut)-1] = '…'
	}
	return strings.TrimRight(string(cut), " "), at, min(max(width, 1), max(1, len(cut)-at+1))
}

// Problems is every fault of a file, in the order of their places.
type Problems struct{ List []Problem }

const (
	mostShown = 100  // faults that are printed; who mends these sees the next
	mostNoted = 1000 // that are written out while a file is read; the rest are counted
)

// Error prints them all; where there are very many, the first of them and how many more there are.
func (p *Problems) Error() string {
	parts := make([]string, min(len(p.List), mostShown))
	for i := range parts {
		parts[i] = p.List[i].Error()
	}
	if more := len(p.List) - len(parts); more > 0 {
		parts = append(parts, fmt.Sprintf("%s: %d more faults are not shown", p.List[0].File, more))
	}
	return strings.Join(parts, "\n")
}

// Locate turns problems found in a plant into ones that show their place in the file it was read from.
func Locate(plant *network.Plant, found []network.Problem) *Problems {
	src := &source{name: plant.File, text: plant.Text}
	all := &Problems{}
	for _, f := range found {
		line := src.line(f.At.Line)
		all.List = append(all.List, Problem{File: src.name, At: f.At, Says: f.Says, Hint: f.Hint, Source: line, Width: wordAt(line, f.At.Column)})
	}
	return all.sorted()
}

// wordAt returns the runes of the word that begins at the column.
func wordAt(line string, column int) int {
	runes := []rune(line)
	if column < 1 || column > len(runes) {
		return 1
	}
	if i := strings.IndexAny(string(runes[column-1:]), " :,{}[]"); i > 0 {
		return utf8.RuneCountInString(string(runes[column-1:])[:i])
	}
	return 1
}

// sorted puts the problems in order of place and drops what stands there twice.
func (p *Problems) sorted() *Problems {
	slices.SortStableFunc(p.List, func(a, b Problem) int {
		return cmp.Or(cmp.Compare(a.File, b.File), cmp.Compare(a.At.Line, b.At.Line), cmp.Compare(a.At.Column, b.At.Column))
	})
	seen := make(map[Problem]bool, len(p.List))
	p.List = slices.DeleteFunc(p.List, func(q Problem) bool {
		twice := seen[q]
		seen[q] = true
		return twice
	})
	return p
}
