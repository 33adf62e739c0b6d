package cli

import (
	"io"
	"os"

	"golang.org/x/term"
)

// Streams are what a command reads and writes; tests hand in memory instead.
type Streams struct {
	In       io.Reader
	Out, Err io.Writer
	OutTerm  bool // Out is a terminal
	ErrTerm  bool
	Width    int // columns of the terminal, 0 when there is none
	Env      func(string) string
}

// watched is an output that keeps the first fault of its writes.
type watched struct {
	io.Writer
	err error
}

func (w *watched) Write(p []byte) (int, error) {
	n, err := w.Writer.Write(p)
	if err != nil && w.err == nil {
		w.err = &unwritten{err}
	}
	return n, err
}

// unwritten tells that standard output took nothing more.
type unwritten struct{ cause error }

func (u *unwritten) Error() string {
	return "cannot write to standard output: " + reason(u.cause).Error()
}

// Unwrap returns the cause.
func (u *unwritten) Unwrap() error { return u.cause }

// System returns the streams of the process.
func System() *Streams {
	s := &Streams{In: os.Stdin, Out: os.Stdout, Err: os.Stderr, Env: os.Getenv}
	s.OutTerm = term.IsTerminal(int(os.Stdout.Fd()))
	s.ErrTerm = term.IsTerminal(int(os.Stderr.Fd()))
	if s.OutTerm {
		if w, _, err := term.GetSize(int(os.Stdout.Fd())); err == nil {
			s.Width = w
		}
	}
	return s
}
