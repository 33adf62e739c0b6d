package viz

import (
	"os"
	"path/filepath"
	"testing"

	"github.com/chromedp/chromedp"
)

// TestQuiet opens pages of every sort at every width, light, dark and without script: no request, nothing on the console, nothing wider than
// the window.
func TestQuiet(t *testing.T) {
	small, big := render(t, cascade(t)), render(t, large(t, 60))
	for _, c := range []struct {
		name    string
		html    []byte
		width   int64
		before  []chromedp.Action[chromedp.Void]
		scripts bool
	}{
		{"small-1200", small, 1200, nil, true},
		{"small-600", small, 600, nil, true},
		{"small-360", small, 360, nil, true},
		{"small-dark", small, 1200, []chromedp.Action[chromedp.Void]{media("prefers-color-scheme", "dark")}, true},
		{"small-360-dark", small, 360, []chromedp.Action[chromedp.Void]{media("prefers-color-scheme", "dark")}, true},
		{"small-noscript", small, 1200, []chromedp.Action[chromedp.Void]{noScript()}, false},
		{"large-1600", big, 1600, nil, true},
	} {
		t.Run(c.name, func(t *testing.T) {
			b := openTab(t, c.html, c.width, 900, c.before...)
			if c.scripts {
				get[bool](b, "headfall.all(), true")
				b.until("headfall.charts.length === document.querySelectorAll('.plot').length")
				if n := get[int](b, "document.querySelectorAll('.plot svg path').length"); n == 0 {
					t.Error("no chart was drawn")
				}
				if over := get[int](b, "document.documentElement.scrollWidth - document.documentElement.clientWidth"); over > 0 {
					t.Errorf("the page is %d px wider than the window", over)
				}
			}
			b.keep(c.name + ".png")
			b.clean()
		})
	}
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
