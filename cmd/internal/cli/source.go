package cli

import (
	"errors"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
)

// source is a plant file as it was read.
type source struct {
	path string // as given; "-" for standard input
	name string // for messages and the report
	data []byte
}

const largest = 16 << 20 // bytes; no plant file is larger

// read reads FILE or standard input.
func (a *app) read(path string) (*source, error) {
	s := &source{path: path, name: filepath.Base(path)}
	var from io.Reader = a.In
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
	data, err := io.ReadAll(io.LimitReader(from, largest+1))
	switch {
	case err != nil:
		return nil, bad("", "cannot read %s: %w", s.name, reason(err))
	case len(data) > largest:
		return nil, bad("", "%s is larger than %d MB", s.name, largest>>20)
	}
	s.data = data
	return s, nil
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
