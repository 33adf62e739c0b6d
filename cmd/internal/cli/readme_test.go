package cli_test

import (
	"bytes"
	"context"
	"flag"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"headfall/cmd/internal/cli"
)

var excerpt = regexp.MustCompile("(?s)```text\n(.*?)```")

// The README shows what its command prints, to the letter.
func TestReadmeShowsWhatIsPrinted(t *testing.T) {
	readme, err := filepath.Abs("../../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	plant := filepath.Join(filepath.Dir(readme), "scenarios", "cellar.yaml")
	t.Chdir(t.TempDir())
	var out, errs bytes.Buffer
	s := &cli.Streams{In: strings.NewReader(""), Out: &out, Err: &errs, Env: func(string) string { return "" }}
	if code := cli.Main(context.Background(), s, []string{"run", plant}); code != cli.ExitFails {
		t.Fatalf("ended with %d: %s", code, errs.String())
	}
	data, err := os.ReadFile(readme)
	if err != nil {
		t.Fatal(err)
	}
	shown := excerpt.FindSubmatchIndex(data)
	if shown == nil {
		t.Fatal("the README shows no ```text")
	}
	if bytes.Equal(data[shown[2]:shown[3]], out.Bytes()) {
		return
	}
	if flag.Lookup("update").Value.String() != "true" {
		t.Fatalf("the README shows something else (go test ./cmd/internal/cli -run Readme -update). It prints:\n%s", out.Bytes())
	}
	whole := append(append(append([]byte{}, data[:shown[2]]...), out.Bytes()...), data[shown[3]:]...)
	if err := os.WriteFile(readme, whole, 0o666); err != nil {
		t.Fatal(err)
	}
}
