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

// check refuses, before anything is computed, what could not be written or would destroy something. read are the paths of what is read.
func (o outputs) check(read ...string) error {
	seen := map[string]bool{}
	for _, x := range o {
		at := placeOf(x.path)
		if seen[at] {
			return bad("give each its own PATH", "two outputs would be written to %s", x.path)
		}
		seen[at] = true
		if x.path == "-" {
			continue
		}
		for _, path := range read {
			if same(path, x.path) {
				return bad("give it another PATH", "%s is read by this command; it is not written over", x.path)
			}
		}
		if err := writable(x.path); err != nil {
			return err
		}
	}
	return nil
}

// placeOf is where a path leads, so that two spellings of one place are seen.
func placeOf(path string) string {
	if path == "-" {
		return path
	}
	if real, err := filepath.EvalSymlinks(path); err == nil {
		path = real
	} else if dir, err := filepath.EvalSymlinks(filepath.Dir(path)); err == nil {
		path = filepath.Join(dir, filepath.Base(path))
	}
	if whole, err := filepath.Abs(path); err == nil {
		return whole
	}
	return path
}

func same(a, b string) bool {
	x, errX := os.Stat(a)
	y, errY := os.Stat(b)
	return a != "-" && errX == nil && errY == nil && os.SameFile(x, y)
}

// writable tries whether a file could be written; it leaves nothing behind.
func writable(path string) error {
	info, err := os.Stat(path)
	switch {
	case err == nil && info.IsDir():
		return bad("", "cannot write %s: it is a directory", path)
	case err == nil && !info.Mode().IsRegular():
		return nil // a device or a pipe is not tried
	case err == nil && info.Mode().Perm()&0o222 == 0:
		return bad("give another PATH, or allow writing it", "cannot write %s: it is there already, and read-only", path)
	}
	dir := filepath.Dir(placeOf(path))
	if d, err := os.Stat(dir); err != nil || !d.IsDir() {
		return bad("", "cannot write %s: there is no directory %s", path, filepath.Dir(path))
	}
	trial, err := os.CreateTemp(dir, ".headfall.*")
	if err != nil {
		return bad("", "cannot write %s: %w", path, reason(err))
	}
	trial.Close()
	os.Remove(trial.Name())
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
	if err := files.check(); err != nil {
		return err
	}
	return files.save(a.Out)
}
