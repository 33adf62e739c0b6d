package cli

import (
	"bytes"
	"encoding/json"
	"flag"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "write the golden files anew")

var licenceName = regexp.MustCompile(`(?i)^(licen[cs]e|notice|copying|patents)`)

// Every library that is linked into the program has its licence text among the notices, word for word.
func TestNoticesCoverWhatIsLinked(t *testing.T) {
	want := linkedLicences(t)
	if *update {
		old, _ := filepath.Glob("notices/*.txt")
		for _, f := range old {
			os.Remove(f)
		}
		for name, text := range want {
			if err := os.WriteFile(filepath.Join("notices", name), text, 0o666); err != nil {
				t.Fatal(err)
			}
		}
	}
	for name, text := range want {
		got, err := os.ReadFile(filepath.Join("notices", name))
		if err != nil {
			t.Errorf("%s is linked but has no notice (go test ./cmd/internal/cli -run Notices -update)", name)
		} else if !bytes.Equal(got, text) {
			t.Errorf("the notice of %s is not its licence text", name)
		}
	}
}

// linkedLicences reads the licence files of every module of the program, and of Go itself.
func linkedLicences(t *testing.T) map[string][]byte {
	out, err := exec.Command("go", "list", "-deps", "-json=Module", "headfall/cmd/headfall").Output()
	if err != nil {
		t.Fatal("go list: ", err)
	}
	goroot, err := exec.Command("go", "env", "GOROOT").Output()
	if err != nil {
		t.Fatal("go env: ", err)
	}
	want := map[string][]byte{"go.txt": licenceText(t, strings.TrimSpace(string(goroot)))}
	for d := json.NewDecoder(bytes.NewReader(out)); d.More(); {
		var p struct{ Module *struct{ Path, Dir string } }
		if err := d.Decode(&p); err != nil {
			t.Fatal(err)
		}
		if p.Module == nil || p.Module.Path == "headfall" {
			continue
		}
		name := strings.ReplaceAll(p.Module.Path, "/", "_") + ".txt"
		if want[name] == nil {
			want[name] = licenceText(t, p.Module.Dir)
		}
	}
	return want
}

func licenceText(t *testing.T, dir string) []byte {
	entries, err := os.ReadDir(dir)
	if err != nil {
		t.Fatal(err)
	}
	var all []byte
	for _, e := range entries {
		if e.IsDir() || !licenceName.MatchString(e.Name()) {
			continue
		}
		data, err := os.ReadFile(filepath.Join(dir, e.Name()))
		if err != nil {
			t.Fatal(err)
		}
		all = append(all, bytes.ReplaceAll(data, []byte("\r\n"), []byte("\n"))...)
	}
	if len(all) == 0 {
		t.Fatalf("no licence text in %s", dir)
	}
	return all
}
