package main

import (
	"errors"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"sync"
	"time"
)

// output guards everything that leaves the program, so that an interrupt never
// meets a half-written file and standard output gets one object at most.
type output struct {
	mu     sync.Mutex
	stdout io.Writer
	closed bool
	wrote  bool  // something went to standard output
	lost   error // a write of the command library that failed; it does not look
}

var errClosed = errors.New("interrupted")

// print writes to standard output.
func (o *output) print(data []byte) error {
	o.mu.Lock()
	defer o.mu.Unlock()
	if o.closed {
		return errClosed
	}
	o.wrote = o.wrote || len(data) > 0
	if _, err := o.stdout.Write(data); err != nil {
		return ioError("Writing to standard output failed", err)
	}
	return nil
}

// Write lets the command library print help through the same gate.
func (o *output) Write(data []byte) (int, error) {
	if err := o.print(data); err != nil {
		o.lost = err
		return 0, err
	}
	return len(data), nil
}

// close stops all further output. It waits a moment for a write that is under
// way, and reports whether standard output is still untouched.
func (o *output) close() (untouched bool) {
	for range 50 {
		if o.mu.TryLock() {
			defer o.mu.Unlock()
			o.closed = true
			return !o.wrote
		}
		time.Sleep(time.Millisecond)
	}
	return false
}

// save writes a file so that it is there whole or not at all: a new file
// beside it, synced, then renamed. A device or pipe is written to directly.
func (o *output) save(path string, data []byte) error {
	o.mu.Lock()
	defer o.mu.Unlock()
	if o.closed {
		return errClosed
	}
	if target, err := filepath.EvalSymlinks(path); err == nil {
		path = target
	}
	mode := fs.FileMode(0o644)
	if info, err := os.Stat(path); err == nil {
		if info.IsDir() {
			return usageError("Name a file in it.", "%s is a folder; a file is expected.", path)
		}
		if !info.Mode().IsRegular() {
			return wrapIO("Writing "+path+" failed", os.WriteFile(path, data, 0))
		}
		mode = info.Mode().Perm()
	}
	return wrapIO("Writing "+path+" failed", replaceFile(path, data, mode))
}

func replaceFile(path string, data []byte, mode fs.FileMode) (err error) {
	f, err := os.CreateTemp(filepath.Dir(path), ".stillair-*")
	if err != nil {
		return err
	}
	defer func() {
		if err != nil {
			f.Close()
			os.Remove(f.Name())
		}
	}()
	if _, err = f.Write(data); err != nil {
		return err
	}
	if err = f.Chmod(mode); err != nil {
		return err
	}
	if err = f.Sync(); err != nil {
		return err
	}
	if err = f.Close(); err != nil {
		return err
	}
	return os.Rename(f.Name(), path)
}

func wrapIO(step string, err error) error {
	if err == nil {
		return nil
	}
	return ioError(step, err)
}

// refuseInput keeps a command from writing over the case file it reads.
func refuseInput(out, in string) error {
	a, errA := os.Stat(out)
	b, errB := os.Stat(in)
	if errA == nil && errB == nil && os.SameFile(a, b) {
		return usageError("Give the result another name.", "%s is the case file itself; it is never written over.", out)
	}
	return nil
}
