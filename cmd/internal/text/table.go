package text

import (
	"strings"
	"unicode/utf8"
)

// table sets rows in columns two blanks apart: the first and those named by left to the left, numbers to the right.
func table(rows [][]string, left ...int) string {
	var wide []int
	for _, row := range rows {
		for i, cell := range row {
			if i == len(wide) {
				wide = append(wide, 0)
			}
			wide[i] = max(wide[i], utf8.RuneCountInString(cell))
		}
	}
	toLeft := map[int]bool{0: true}
	for _, i := range left {
		toLeft[i] = true
	}
	var b strings.Builder
	for _, row := range rows {
		var line strings.Builder
		for i, cell := range row {
			blanks := strings.Repeat(" ", wide[i]-utf8.RuneCountInString(cell))
			if toLeft[i] {
				cell += blanks
			} else {
				cell = blanks + cell
			}
			line.WriteString(printable(cell) + "  ")
		}
		b.WriteString(strings.TrimRight(line.String(), " ") + "\n")
	}
	return b.String()
}
