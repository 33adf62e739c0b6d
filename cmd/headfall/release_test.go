package main

import (
	"bytes"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"runtime"
	"strings"
	"testing"
)

// A release of one commit is the same to the byte wherever the tree lies, and says which commit it is of.
func TestReleaseIsReproducible(t *testing.T) {
	if runtime.GOOS == "windows" {
		return // the recipe is a script for other systems
	}
	target := runtime.GOOS + "/" + runtime.GOARCH
	var built [][]byte
	var program string
	for _, where := range []string{"here", "some/where/else"} {
		tree, out := filepath.Join(t.TempDir(), where), t.TempDir()
		call(t, ".", "git", "clone", "--quiet", root(t), tree)
		call(t, tree, filepath.Join(tree, ".ci", "release"), out, target)
		sums, err := os.ReadFile(filepath.Join(out, "SHA256SUMS"))
		if err != nil {
			t.Fatal(err)
		}
		program = filepath.Join(out, "headfall-"+strings.ReplaceAll(target, "/", "-"))
		built = append(built, sums)
	}
	if !bytes.Equal(built[0], built[1]) {
		t.Errorf("two builds of one commit differ:\n%s%s", built[0], built[1])
	}
	said := call(t, ".", program, "version")
	commit := call(t, ".", "git", "rev-parse", "HEAD")
	tag, _ := exec.Command("git", "describe", "--exact-match", "--match", "v*").Output()
	want := regexp.QuoteMeta(commit[:12])
	if len(tag) > 0 {
		want = regexp.QuoteMeta(strings.TrimPrefix(strings.TrimSpace(string(tag)), "v"))
	}
	if !regexp.MustCompile(`^headfall [0-9.]+\S*\n$`).MatchString(said) || !regexp.MustCompile(want).MatchString(said) || strings.Contains(said, "dirty") {
		t.Errorf("it says %q, want the version %s", said, want)
	}
}

func root(t *testing.T) string {
	return strings.TrimSpace(call(t, ".", "git", "rev-parse", "--show-toplevel"))
}

func call(t *testing.T, dir, name string, args ...string) string {
	t.Helper()
	cmd := exec.Command(name, args...)
	cmd.Dir = dir
	out, err := cmd.Output()
	if err != nil {
		said := ""
		if exit, ok := err.(*exec.ExitError); ok {
			said = string(exit.Stderr)
		}
		t.Fatalf("%s %s: %v\n%s%s", name, strings.Join(args, " "), err, out, said)
	}
	return string(out)
}
