package viz

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/chromedp/chromedp"

	"headfall/network"
)

// TestQuiet opens pages of every sort at every width, light, dark and without script: no request, nothing on the console, nothing wider than
// the window.
func TestQuiet(t *testing.T) {
	small, big := render(t, studied(t)), render(t, large(t, 120))
	for _, c := range []struct {
		name    string
		html    []byte
		widths  []int64
		before  []chromedp.Action[chromedp.Void]
		scripts bool
	}{
		{"small", small, []int64{1200, 600, 360}, nil, true},
		{"small-dark", small, []int64{1200}, []chromedp.Action[chromedp.Void]{media("prefers-color-scheme", "dark")}, true},
		{"small-noscript", small, []int64{1200, 360}, []chromedp.Action[chromedp.Void]{noScript()}, false},
		{"large", big, []int64{1600}, nil, true},
	} {
		t.Run(c.name, func(t *testing.T) {
			b := openTab(t, c.html, c.widths[0], 900, c.before...)
			for _, width := range c.widths {
				b.do(chromedp.EmulateViewport(width, 900))
				if c.scripts {
					get[bool](b, "headfall.all(), true")
					b.until("headfall.charts.length === document.querySelectorAll('.plot').length")
					b.until("headfall.charts.every(function (c) { return Math.abs(c.getWidth() - c.getDom().parentNode.clientWidth) < 2; })")
					if n := get[int](b, "document.querySelectorAll('.plot svg path').length"); n == 0 {
						t.Error("no chart was drawn")
					}
					if over := get[int](b, "document.documentElement.scrollWidth - document.documentElement.clientWidth"); over > 0 {
						t.Errorf("at %d px the page is %d px wider than the window", width, over)
					}
				}
				b.keep(fmt.Sprintf("%s-%d.png", c.name, width))
			}
			b.clean()
		})
	}
}

// TestBroadPlant has forty vessels drawn on a page of their own across; the print itself is kept for a look when asked for.
func TestBroadPlant(t *testing.T) {
	html := render(t, large(t, 600))
	if !bytes.Contains(html, []byte(`class="elevation broad"`)) {
		t.Error("forty vessels must be printed across")
	}
	dir := os.Getenv("VIZ_OUT")
	if dir == "" {
		return
	}
	b := openTab(t, html, 1200, 900)
	pdf, err := chromedp.Run(b.ctx, chromedp.PrintToPDF(chromedp.PDFPreferCSSPageSize()))
	if err != nil {
		t.Fatal(err)
	}
	os.WriteFile(filepath.Join(dir, "large.pdf"), pdf, 0o644)
	b.clean()
}

func TestPrint(t *testing.T) {
	b := openTab(t, render(t, cascade(t)), 1200, 900, media("prefers-color-scheme", "dark"))
	pdf, err := chromedp.Run(b.ctx, chromedp.PrintToPDF(chromedp.PDFPreferCSSPageSize()))
	if err != nil {
		t.Fatal(err)
	}
	if len(pdf) < 20000 {
		t.Errorf("the print has only %d bytes", len(pdf))
	}
	b.until("headfall.charts.length === document.querySelectorAll('.plot').length")
	b.clean()
	if dir := os.Getenv("VIZ_OUT"); dir != "" {
		os.WriteFile(filepath.Join(dir, "report.pdf"), pdf, 0o644)
	}
}

// TestSheetPages prints a long plan: as many sheets of paper as the sheets say there are.
func TestSheetPages(t *testing.T) {
	p := cascade(t)
	for i := range 70 {
		s := *p.Result.Steps[i%3]
		at := 300 + 60*float64(i)
		s.Done, s.Due = &at, &at
		if i%5 == 0 {
			s.Note = "a longer note on what to look for, to whom to talk, and what to write down before going on to the next valve"
		}
		p.Result.Steps = append(p.Result.Steps, &s)
	}
	for i := range 30 {
		row := network.LineUpRow{Valve: fmt.Sprintf("V-%d", i), Position: "shut", Kind: "valve"}
		if i%3 == 0 {
			row.Where, row.Opens = "cellar, north wall, low", "T-1 to SUMP"
		}
		p.Result.LineUp = append(p.Result.LineUp, row)
	}
	for range 3 {
		p.Result.Handover = append(p.Result.Handover, p.Result.Handover[0])
	}
	var b bytes.Buffer
	if err := WriteSheet(&b, p); err != nil {
		t.Fatal(err)
	}
	want := strings.Count(b.String(), `class="sheet-page"`)
	tab := openTab(t, b.Bytes(), 1000, 1200)
	pdf, err := chromedp.Run(tab.ctx, chromedp.PrintToPDF(chromedp.PDFPreferCSSPageSize()))
	if err != nil {
		t.Fatal(err)
	}
	if got := len(regexp.MustCompile(`/Type\s*/Page\b`).FindAll(pdf, -1)); got != want || want < 4 {
		t.Errorf("%d pages were printed, the sheet says %d", got, want)
	}
	if dir := os.Getenv("VIZ_OUT"); dir != "" {
		os.WriteFile(filepath.Join(dir, "sheet.pdf"), pdf, 0o644)
	}
	tab.clean()
}
