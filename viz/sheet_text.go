package viz

import (
	"bufio"
	"fmt"
	"io"
	"strings"
)

// textWidth is the width of a sheet in plain text.
const textWidth = 118

// SheetText writes the sequence sheet as plain text.
func SheetText(w io.Writer, p Page) error {
	u, c := newUnits(p.Plant.Show), newClock(p)
	s := plainSheet{bufio.NewWriter(w)}
	s.head(p, c)
	s.steps(sheetRows(p, u, c))
	s.foot(p, u, c)
	return s.out.Flush()
}

// plainSheet is a sheet being written as plain text.
type plainSheet struct{ out *bufio.Writer }

func (s plainSheet) say(format string, args ...any) {
	fmt.Fprintln(s.out, strings.TrimRight(strings.ReplaceAll(clean(fmt.Sprintf(format, args...)), "\u00a0", " "), " "))
}

// rule draws a line across.
func (s plainSheet) rule(of string) { s.say("%s", strings.Repeat(of, textWidth)) }

// head says which plan this is, and what is to be lined up before it.
func (s plainSheet) head(p Page, c clock) {
	rev := p.Plant.Revision
	if rev == "" {
		rev = "not stated"
	}
	s.say("%s   rev %s   %s", oneLine(p.Plant.Title), rev, c.Day(0))
	s.say("from %s  sha256 %s", p.Plant.File, p.Plant.SHA256)
	s.say("verdict: %s (%s)", newVerdictWord(p.Result), limitCount(p.Result))
	s.rule("=")
	if len(p.Result.LineUp) > 0 {
		s.say("LINE-UP BEFORE STEP 1")
		for _, l := range p.Result.LineUp {
			s.say("  [ ] %-14s %-10s %s", l.Valve, l.Position, strings.TrimSpace(l.Where+opensWords(l.Opens)))
		}
		s.say("      checked by ____________________")
		s.rule("-")
	}
}

// stepWidths are the columns of a step.
var stepWidths = []int{4, 12, 10, 36, 26, 18}

// steps lists the steps and holds.
func (s plainSheet) steps(rows []sheetRow) {
	s.say("%s", strings.Join(cells(stepWidths, [][]string{{"#"}, {"Clock"}, {"Who"}, {"Action"}, {"Expect"}, {"Stop if"}}, 0), " ")+" Done")
	for _, r := range rows {
		s.rule("-")
		if r.Hold {
			s.say("HOLD %-11s %s", r.Clock, strings.TrimSpace(oneLine(r.Rest)+"   signed ______________"))
			if r.Longest != "" {
				s.say("%17s%s", "", r.Longest)
			}
			continue
		}
		cols, most := stepColumns(r), 0
		for _, col := range cols {
			most = max(most, len(col))
		}
		for i := range most {
			done := ""
			if i == 0 {
				done = " ____"
			}
			s.say("%s", strings.Join(cells(stepWidths, cols, i), " ")+done)
		}
	}
	s.rule("=")
}

// stepColumns wraps what a step says into its columns.
func stepColumns(r sheetRow) [][]string {
	when := []string{r.Clock}
	if r.Elapsed != "" {
		when = append(when, "("+r.Elapsed+")")
	}
	action := wrap(oneLine(r.Action), stepWidths[3])
	for _, extra := range []string{r.Where, r.Note, r.Pending, togetherWords(r.Together)} {
		action = append(action, wrap(oneLine(extra), stepWidths[3])...)
	}
	expect := wrap(r.Expect, stepWidths[4])
	if r.Range != "" {
		expect = append(expect, wrap("("+r.Range+")", stepWidths[4])...)
	}
	return [][]string{{r.N}, when, wrap(r.Who, stepWidths[2]), action, expect, wrap(r.StopIf, stepWidths[5])}
}

// foot writes what the next shift is told, and the cautions.
func (s plainSheet) foot(p Page, u units, c clock) {
	for _, h := range handovers(p, u, c) {
		s.say("HANDOVER %s", h.When)
		s.say("  levels    %s", strings.Join(h.Levels, "; "))
		s.say("  positions %s", strings.Join(h.Valves, "; "))
		s.say("  next step  %s", orNone(h.NextStep))
		s.say("  next limit %s", orNone(h.NextLimit))
	}
	for _, caution := range cautions(p.Plant, p.Result) {
		for i, line := range wrap(oneLine(caution), textWidth-4) {
			lead := "!   "
			if i > 0 {
				lead = "    "
			}
			s.say("%s%s", lead, line)
		}
	}
}

func opensWords(s string) string {
	if s == "" {
		return ""
	}
	return "   else opens: " + s
}

func togetherWords(b bool) string {
	if b {
		return "at the same time as the step before"
	}
	return ""
}

func orNone(s string) string {
	if s == "" {
		return "none"
	}
	return s
}

func oneLine(s string) string { return strings.Join(strings.Fields(clean(s)), " ") }

// cells takes line i of every column, padded to its width.
func cells(widths []int, cols [][]string, i int) []string {
	out := make([]string, len(widths))
	for n, w := range widths {
		text := ""
		if n < len(cols) && i < len(cols[n]) {
			text = cols[n][i]
		}
		out[n] = text + strings.Repeat(" ", max(w-len([]rune(text)), 0))
	}
	return out
}

// wrap breaks words into lines of at most width characters.
func wrap(s string, width int) []string {
	var out []string
	line := ""
	for _, word := range strings.Fields(s) {
		for len([]rune(word)) > width {
			r := []rune(word)
			if line != "" {
				out, line = append(out, line), ""
			}
			out, word = append(out, string(r[:width])), string(r[width:])
		}
		if line != "" && len([]rune(line))+1+len([]rune(word)) > width {
			out, line = append(out, line), ""
		}
		line = strings.TrimLeft(line+" "+word, " ")
	}
	if line != "" {
		out = append(out, line)
	}
	return out
}
