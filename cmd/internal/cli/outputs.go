package cli

import (
	"io"
	"os"
	"path/filepath"
)

// output is one file to be written.
type output struct {
	path  string // "-" is standard output
	write func(io.Writer) error
}

// outputs are written together: all of them or none.
type outputs []output

// add enters a file; an empty path is none.
func (o *outputs) add(path string, write func(io.Writer) error) {
	if path != "" {
		*o = append(*o, output{path, write})
	}
}

// toOut tells whether one of them takes standard output; the text then goes to standard error.
func (o outputs) toOut() bool {
	for _, x := range o {
		if x.path == "-" {
			return true
		}
	}
	return false
}

// check refuses, before anything is computed, what could not be written or would destroy something.
func (o outputs) check(src *source) error {
	seen := map[string]bool{}
	for _, x := range o {
		if seen[x.path] {
			return bad("give each its own PATH", "two outputs would be written to %s", x.path)
		}
		seen[x.path] = true
		if x.path == "-" {
			continue
		}
		info, err := os.Stat(x.path)
		if err == nil && info.IsDir() {
			return bad("", "cannot write %s: it is a directory", x.path)
		}
		if own, e := os.Stat(src.path); e == nil && err == nil && os.SameFile(own, info) {
			return bad("", "%s is the plant file itself; it is not written over", x.path)
		}
		if dir, e := os.Stat(filepath.Dir(x.path)); e != nil || !dir.IsDir() {
			return bad("", "cannot write %s: there is no directory %s", x.path, filepath.Dir(x.path))
		}
	}
	return nil
}

// save writes all files beside their places first and moves them there when every one is whole.
func (o outputs) save(out io.Writer) error {
	var staged []*stage
	defer func() {
		for _, s := range staged {
			s.drop()
		}
	}()
	for _, x := range o {
		if x.path == "-" {
			continue
		}
		s, err := write(x)
		if err != nil {
			return bad("", "cannot write %s: %w", x.path, reason(err))
		}
		staged = append(staged, s)
	}
	for _, s := range staged {
		if err := s.settle(); err != nil {
			return bad("", "cannot write %s: %w", s.path, reason(err))
		}
	}
	for _, x := range o {
		if x.path == "-" {
			if err := buffered(out, x.write); err != nil {
				return err
			}
		}
	}
	return nil
}

// only writes one file, with nothing to print besides.
func (a *app) only(path string, write func(io.Writer) error) error {
	files := outputs{{path, write}}
	if err := files.check(&source{}); err != nil {
		return err
	}
	return files.save(a.Out)
}
