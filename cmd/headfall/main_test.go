package main

import (
	"errors"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"syscall"
	"testing"
	"time"
)

// The first interrupt ends the program in order, also while it waits for its input, with the exit code for it.
func TestInterrupt(t *testing.T) {
	if runtime.GOOS == "windows" {
		return // no signal can be sent there
	}
	program := filepath.Join(t.TempDir(), "headfall")
	if out, err := exec.Command("go", "build", "-o", program, ".").CombinedOutput(); err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	cmd := exec.Command(program, "run", "-", "--no-report")
	hold, err := cmd.StdinPipe() // stays open: the program waits
	if err != nil {
		t.Fatal(err)
	}
	defer hold.Close()
	var said strings.Builder
	cmd.Stderr = &said
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	defer time.AfterFunc(time.Minute, func() { cmd.Process.Kill() }).Stop()
	time.Sleep(500 * time.Millisecond) // until it catches signals
	if err := cmd.Process.Signal(syscall.SIGINT); err != nil {
		t.Fatal(err)
	}
	var exit *exec.ExitError
	if err := cmd.Wait(); !errors.As(err, &exit) || exit.ExitCode() != 130 {
		t.Errorf("ended with %v, want exit code 130", err)
	}
	if !strings.Contains(said.String(), "interrupted") {
		t.Errorf("said %q", said.String())
	}
}
