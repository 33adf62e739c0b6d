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
