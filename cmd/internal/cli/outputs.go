package cli

import (
	"bufio"
	"crypto/rand"
	"encoding/hex"
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

// stage is a file written beside its place.
type stage struct{ path, temp string }

func write(x output) (*stage, error) {
	target := x.path
	if real, err := filepath.EvalSymlinks(target); err == nil {
		target = real
	}
	mode := os.FileMode(0o666)
	if info, err := os.Stat(target); err == nil {
		if !info.Mode().IsRegular() { // a device or a pipe is written to, not replaced
			return &stage{path: x.path}, direct(target, x.write)
		}
		mode = info.Mode().Perm()
	}
	var tail [6]byte
	rand.Read(tail[:])
	s := &stage{path: target, temp: filepath.Join(filepath.Dir(target), "."+filepath.Base(target)+"."+hex.EncodeToString(tail[:]))}
	f, err := os.OpenFile(s.temp, os.O_WRONLY|os.O_CREATE|os.O_EXCL, mode)
	if err != nil {
		return nil, err
	}
	err = buffered(f, x.write)
	if e := f.Close(); err == nil {
		err = e
	}
	if err != nil {
		s.drop()
		return nil, err
	}
	return s, nil
}

func (s *stage) settle() error {
	if s.temp == "" {
		return nil
	}
	err := os.Rename(s.temp, s.path)
	if err == nil {
		s.temp = ""
	}
	return err
}

func (s *stage) drop() {
	if s.temp != "" {
		os.Remove(s.temp)
	}
}

func direct(path string, write func(io.Writer) error) error {
	f, err := os.OpenFile(path, os.O_WRONLY, 0)
	if err != nil {
		return err
	}
	defer f.Close()
	return buffered(f, write)
}

func buffered(w io.Writer, write func(io.Writer) error) error {
	b := bufio.NewWriter(w)
	if err := write(b); err != nil {
		return err
	}
	return b.Flush()
}
