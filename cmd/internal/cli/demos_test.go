package cli_test

import (
	"bytes"
	"context"
	"os"
	"strings"
	"testing"

	"headfall/cmd/internal/cli"
	"headfall/scenarios"
)

// Of every demo the answer stands in the first ten lines: the verdict, what fails, the least margin, the end; the table of headroom begins there.
func TestAnswerComesFirst(t *testing.T) {
	t.Chdir(t.TempDir())
	for _, name := range scenarios.Demos() {
		data, _ := scenarios.Demo(name)
		if err := os.WriteFile(name+".yaml", data, 0o666); err != nil {
			t.Fatal(err)
		}
		var out, errs bytes.Buffer
		s := &cli.Streams{In: strings.NewReader(""), Out: &out, Err: &errs, Env: func(string) string { return "" }}
		if code := cli.Main(context.Background(), s, []string{"run", name + ".yaml", "--no-report"}); code > cli.ExitFails {
			t.Errorf("%s ended with %d: %s", name, code, errs.String())
		}
		lines := strings.Split(out.String(), "\n")
		for i, line := range lines {
			if strings.HasPrefix(line, "Headroom") && i >= 10 {
				t.Errorf("%s: the headroom begins in line %d:\n%s", name, i+1, out.String())
			}
			if len([]rune(line)) > 110 {
				t.Errorf("%s: a line is %d wide: %s", name, len([]rune(line)), line)
			}
		}
	}
}
