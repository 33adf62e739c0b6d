package cli

import (
	"bufio"
	"crypto/rand"
	"encoding/hex"
	"io"
	"os"
	"path/filepath"
)

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
