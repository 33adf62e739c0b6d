package cli

import (
	"context"
	"errors"
	"fmt"
	"strings"
	"syscall"
)

// The exit codes.
const (
	ExitHolds       = 0   // finished, every limit holds
	ExitFails       = 1   // a limit fails, a step was never reached, or too close to call
	ExitBad         = 2   // bad usage or a bad file; nothing was written
	ExitUnfinished  = 3   // the calculation could not finish, ran out of its time, or its answer could not be printed
	ExitInterrupted = 130 // interrupted; what was computed is kept and marked
)

// Exit ends the program with a code. Err is what to tell; nil when all was told already.
type Exit struct {
	Code int
	Err  error
	Hint string
}

func (e *Exit) Error() string {
	if e.Err == nil {
		return fmt.Sprintf("exit code %d", e.Code)
	}
	return e.Err.Error()
}

// Unwrap returns what went wrong.
func (e *Exit) Unwrap() error { return e.Err }

// code ends with a code and nothing more to say; nil for 0.
func code(n int) error {
	if n == ExitHolds {
		return nil
	}
	return &Exit{Code: n}
}

// bad is a fault of usage or of a file.
func bad(hint, format string, args ...any) error {
	return &Exit{Code: ExitBad, Err: fmt.Errorf(format, args...), Hint: hint}
}

var (
	errInterrupted = errors.New("interrupted")
	errTimeout     = errors.New("out of time")
)

// finish tells what is left to tell and returns the exit code.
func (a *app) finish(err error) int {
	if err == nil {
		return ExitHolds
	}
	if errors.Is(err, syscall.EPIPE) {
		return a.settled // the reader had enough; it gets no more words
	}
	var e *Exit
	if !errors.As(err, &e) {
		e = &Exit{Code: ExitUnfinished, Err: err}
		if errors.Is(err, context.Canceled) || errors.Is(err, errInterrupted) {
			e.Code = ExitInterrupted
		}
	}
	if e.Err != nil {
		a.complain(e)
	}
	return e.Code
}

// complain prints an error; one that already carries its place in a file stands as it is.
func (a *app) complain(e *Exit) {
	said := strings.TrimRight(e.Err.Error(), "\n")
	if !faults(e.Err) {
		said = "headfall: " + said
	}
	fmt.Fprintln(a.Err, said)
	if e.Hint != "" {
		fmt.Fprintln(a.Err, "  "+e.Hint)
	}
}
