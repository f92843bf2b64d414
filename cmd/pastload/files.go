package main

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"
)

// A file is an output file that is complete in memory.
type file struct {
	name string // relative to the output folder, with forward slashes
	data []byte
}

// writeFiles writes finished files into a folder. Each appears whole under its
// name or not at all; when one fails, those written by this call are removed
// unless they replaced an older file.
func writeFiles(dir string, files []file) error {
	var made []string
	for _, f := range files {
		path := filepath.Join(dir, filepath.FromSlash(f.name))
		_, err := os.Lstat(path)
		isNew := errors.Is(err, os.ErrNotExist)
		if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
			return undo(made, err)
		}
		if err := writeWhole(path, f.data); err != nil {
			return undo(made, err)
		}
		if isNew {
			made = append(made, path)
		}
	}
	return nil
}

func undo(made []string, err error) error {
	for _, p := range made {
		os.Remove(p)
	}
	return err
}

// writeWhole writes a file beside its final name and renames it into place. A
// link is followed, a file keeps its permissions, and what is no file (a device,
// a pipe) is written to as it is.
func writeWhole(path string, data []byte) (err error) {
	if real, err := filepath.EvalSymlinks(path); err == nil {
		path = real
	}
	mode := fs.FileMode(0o644)
	if info, err := os.Stat(path); err == nil {
		if info.IsDir() {
			return fmt.Errorf("%s is a folder; name a file", path)
		}
		if !info.Mode().IsRegular() {
			return writeInto(path, data)
		}
		mode = info.Mode().Perm()
	}
	t, err := os.CreateTemp(filepath.Dir(path), ".pastload-*")
	if err != nil {
		return fmt.Errorf("%s could not be written: its folder %w", path, errors.Unwrap(err))
	}
	defer func() {
		if err != nil {
			t.Close()
			os.Remove(t.Name())
			err = fmt.Errorf("%s could not be written: %w; if it is open in another program, close it there", path, err)
		}
	}()
	if _, err = t.Write(data); err != nil {
		return err
	}
	if err = t.Chmod(mode); err != nil {
		return err
	}
	if err = t.Close(); err != nil {
		return err
	}
	return os.Rename(t.Name(), path)
}

// writeInto writes to a device or a pipe.
func writeInto(path string, data []byte) error {
	f, err := os.OpenFile(path, os.O_WRONLY, 0)
	if err != nil {
		return err
	}
	if _, err := f.Write(data); err != nil {
		f.Close()
		return err
	}
	return f.Close()
}

// deliver sends finished results to the file of -o or to standard output.
func (c *common) deliver(cmd *cobra.Command, data []byte) error {
	if c.output == "" {
		_, err := cmd.OutOrStdout().Write(data)
		return err
	}
	return writeWhole(c.output, data)
}

// remark prints a remark to standard error unless the run is to be quiet.
func (c *common) remark(cmd *cobra.Command, format string, a ...any) {
	if !c.quiet {
		fmt.Fprintf(cmd.ErrOrStderr(), format+"\n", a...)
	}
}

// fileName makes a file name from a borehole or specimen name: letters, digits,
// dash, dot and underscore stay, everything else becomes a dash. Names that a
// system reserves get a leading underscore.
func fileName(name string) string {
	s := strings.Map(func(r rune) rune {
		switch {
		case r >= 'a' && r <= 'z', r >= 'A' && r <= 'Z', r >= '0' && r <= '9', r == '.', r == '_', r == '-':
			return r
		}
		return '-'
	}, name)
	s = strings.Trim(s, ".-")
	if len(s) > 60 {
		s = s[:60]
	}
	switch base, _, _ := strings.Cut(strings.ToUpper(s), "."); base {
	case "":
		return "_"
	case "CON", "PRN", "AUX", "NUL",
		"COM1", "COM2", "COM3", "COM4", "COM5", "COM6", "COM7", "COM8", "COM9",
		"LPT1", "LPT2", "LPT3", "LPT4", "LPT5", "LPT6", "LPT7", "LPT8", "LPT9":
		return "_" + s
	}
	return s
}

// uniqueNames makes a file name for each name, none twice even where a file
// system does not tell capitals apart.
func uniqueNames(names []string) []string {
	used := map[string]bool{}
	out := make([]string, len(names))
	for i, n := range names {
		base := fileName(n)
		s := base
		for k := 2; used[strings.ToLower(s)]; k++ {
			s = fmt.Sprintf("%s-%d", base, k)
		}
		used[strings.ToLower(s)] = true
		out[i] = s
	}
	return out
}

// drawn collects what a drawing function writes.
func drawn(draw func(io.Writer) error) ([]byte, error) {
	var b strings.Builder
	if err := draw(&b); err != nil {
		return nil, err
	}
	return []byte(b.String()), nil
}
