package viz

import (
	"bufio"
	"fmt"
	"io"
	"strings"

	"headfall/viz/export"

	"headfall/network"
)

func moverTags(plant *network.Plant) []string { return export.Movers(plant) }

// textWidth is the width of a sheet in plain text.
const textWidth = 118

// SheetText writes the sequence sheet as plain text.
func SheetText(w io.Writer, p Page) error {
	u, c := newUnits(p.Plant.Show), newClock(p)
	rows := sheetRows(p, u, c)
	out := bufio.NewWriter(w)
	say := func(format string, args ...any) {
		fmt.Fprintln(out, strings.TrimRight(strings.ReplaceAll(clean(fmt.Sprintf(format, args...)), "\u00a0", " "), " "))
	}
	rev := p.Plant.Revision
	if rev == "" {
		rev = "not stated"
	}
	say("%s   rev %s   %s", oneLine(p.Plant.Title), rev, c.Day(0))
	say("from %s  sha256 %s", p.Plant.File, p.Plant.SHA256)
	say("verdict: %s (%s)", newVerdictWord(p.Result), limitCount(p.Result))
	say("%s", strings.Repeat("=", textWidth))
	if len(p.Result.LineUp) > 0 {
		say("LINE-UP BEFORE STEP 1")
		for _, l := range p.Result.LineUp {
			say("  [ ] %-14s %-10s %s", l.Valve, l.Position, strings.TrimSpace(l.Where+opensWords(l.Opens)))
		}
		say("      checked by ____________________")
		say("%s", strings.Repeat("-", textWidth))
	}
	widths := []int{4, 12, 10, 36, 26, 18}
	say("%s", strings.Join(cells(widths, [][]string{{"#"}, {"Clock"}, {"Who"}, {"Action"}, {"Expect"}, {"Stop if"}}, 0), " ")+" Done")
	for _, r := range rows {
		say("%s", strings.Repeat("-", textWidth))
		if r.Hold {
			say("HOLD %-11s %s", r.Clock, strings.TrimSpace(oneLine(r.Rest)+"   signed ______________"))
			if r.Longest != "" {
				say("%17s%s", "", r.Longest)
			}
			continue
		}
		action := wrap(oneLine(r.Action), widths[3])
		for _, extra := range []string{r.Where, r.Note, r.Pending, togetherWords(r.Together)} {
			if extra != "" {
				action = append(action, wrap(oneLine(extra), widths[3])...)
			}
		}
		expect := wrap(r.Expect, widths[4])
		if r.Range != "" {
			expect = append(expect, wrap("("+r.Range+")", widths[4])...)
		}
		when := []string{r.Clock}
		if r.Elapsed != "" {
			when = append(when, "("+r.Elapsed+")")
		}
		cols := [][]string{{r.N}, when, wrap(r.Who, widths[2]), action, expect, wrap(r.StopIf, widths[5])}
		most := 0
		for _, col := range cols {
			most = max(most, len(col))
		}
		for i := range most {
			done := ""
			if i == 0 {
				done = " ____"
			}
			say("%s", strings.Join(cells(widths, cols, i), " ")+done)
		}
	}
	say("%s", strings.Repeat("=", textWidth))
	for _, h := range handovers(p, u, c) {
		say("HANDOVER %s", h.When)
		say("  levels    %s", strings.Join(h.Levels, "; "))
		say("  positions %s", strings.Join(h.Valves, "; "))
		say("  next step  %s", orNone(h.NextStep))
		say("  next limit %s", orNone(h.NextLimit))
	}
	for _, s := range cautions(p.Plant, p.Result) {
		for i, line := range wrap(oneLine(s), textWidth-4) {
			lead := "!   "
			if i > 0 {
				lead = "    "
			}
			say("%s%s", lead, line)
		}
	}
	return out.Flush()
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
