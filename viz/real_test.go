package viz

import (
	"os"
	"path/filepath"
	"testing"
)

func TestRealLook(t *testing.T) {
	dir := os.Getenv("VIZ_OUT")
	for _, n := range []string{"cellar", "ten_vessels", "hillside", "equalisation"} {
		html, err := os.ReadFile(filepath.Join(dir, n+".html"))
		if err != nil {
			continue
		}
		b := openTab(t, html, 1200, 900)
		get[bool](b, "headfall.all(), document.getElementById('playbar').style.position='static', headfall.go(3000), true")
		b.keep("real-" + n + ".png")
		b.clean()
	}
}
