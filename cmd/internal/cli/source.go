package cli

import (
	"context"
	"errors"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"headfall/scenarios"
)

// source is a plant file as it was read.
type source struct {
	path string // as given; "-" for standard input
	name string // for messages and the report
	data []byte
}

// read reads FILE or standard input, until it ends or the program is interrupted.
func (a *app) read(ctx context.Context, path string) (*source, error) {
	s := &source{path: path, name: filepath.Base(path)}
	from := a.In
	if path == "-" {
		s.name = "standard input"
	} else {
		f, err := os.Open(path)
		if err != nil {
			return nil, bad("", "cannot read %s: %w", path, reason(err))
		}
		defer f.Close()
		from = f
	}
	data, err := readAll(ctx, from)
	switch {
	case ctx.Err() != nil:
		return nil, &Exit{Code: ExitInterrupted, Err: errInterrupted}
	case err != nil:
		return nil, bad("", "cannot read %s: %w", s.name, reason(err))
	case len(data) > scenarios.MaxSize:
		return nil, bad("", "%s is larger than %d MB", s.name, scenarios.MaxSize>>20)
	}
	s.data = data
	return s, nil
}

// readAll reads to the end, but does not wait for it once the program is interrupted: a terminal or a pipe may never end.
func readAll(ctx context.Context, from io.Reader) (data []byte, err error) {
	done := make(chan struct{})
	go func() {
		defer close(done)
		data, err = io.ReadAll(io.LimitReader(from, scenarios.MaxSize+1))
	}()
	select {
	case <-done:
		return data, err
	case <-ctx.Done():
		return nil, ctx.Err()
	}
}

// base is the file's name without its ending, for the names of what is written.
func (s *source) base() string {
	if s.path == "-" {
		return "headfall"
	}
	return strings.TrimSuffix(s.name, filepath.Ext(s.name))
}

// reason leaves out the path that the message names already.
func reason(err error) error {
	var p *fs.PathError
	if errors.As(err, &p) {
		return p.Err
	}
	return err
}
