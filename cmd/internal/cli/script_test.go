package cli_test

import (
	"context"
	"encoding/json"
	"os"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"

	"headfall/cmd/internal/cli"
)

// The scripts run whole command lines (testdata/script/*.txtar), with the program as the command headfall.
func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){
		"headfall": func() { os.Exit(cli.Main(context.Background(), cli.System(), os.Args[1:])) },
	})
}

func TestScripts(t *testing.T) {
	testscript.Run(t, testscript.Params{
		Dir: "testdata/script",
		Cmds: map[string]func(*testscript.TestScript, bool, []string){
			"json": wantJSON, "code": wantCode,
		},
		RequireExplicitExec: true,
	})
}

// wantJSON is the script command "json FILE key=value …": FILE (or stdout) is JSON and its top-level keys have these values.
func wantJSON(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) == 0 {
		ts.Fatalf("usage: json FILE [key=value …]")
	}
	var all map[string]any
	if err := json.Unmarshal([]byte(ts.ReadFile(args[0])), &all); err != nil {
		ts.Fatalf("%s: %v", args[0], err)
	}
	for _, arg := range args[1:] {
		key, want, err := pair(arg)
		ts.Check(err)
		got, _ := json.Marshal(all[key])
		if string(got) != want {
			ts.Fatalf("%s: %s is %s, want %s", args[0], key, got, want)
		}
	}
}

// wantCode is the script command "code N headfall …": the command ends with exit code N.
func wantCode(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: code N command …")
	}
	got := "0"
	if err := ts.Exec(args[1], args[2:]...); err != nil {
		got = exitCode(err)
	}
	if got != args[0] {
		ts.Fatalf("%q ended with %s, want %s", args[1:], got, args[0])
	}
}
