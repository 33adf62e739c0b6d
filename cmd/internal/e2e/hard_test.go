package e2e

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// Plants of testdata/hard once stalled, did not settle, hung, or kept books that did not close. Each is named after what was hard about it.
func TestHardPlants(t *testing.T) {
	files, err := filepath.Glob("../../../testdata/hard/*.yaml")
	if err != nil || len(files) == 0 {
		t.Fatal(files, err)
	}
	for _, f := range files {
		t.Run(strings.TrimSuffix(filepath.Base(f), ".yaml"), func(t *testing.T) {
			text, err := os.ReadFile(f)
			if err != nil {
				t.Fatal(err)
			}
			if r := run(t, string(text), how{}); r.Work.Steps > 6000 {
				t.Errorf("%d steps", r.Work.Steps)
			}
		})
	}
}
