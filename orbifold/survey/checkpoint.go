package survey

import (
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
)

// checkpoint is a file that holds finished work.
type checkpoint struct{ name string }

// read returns the contents; nil if there is no file or no name.
func (c checkpoint) read() ([]byte, error) {
	if c.name == "" {
		return nil, nil
	}
	file, err := os.Open(c.name)
	if errors.Is(err, fs.ErrNotExist) {
		return nil, nil
	}
	if err != nil {
		return nil, fmt.Errorf("survey: checkpoint: %w", err)
	}
	defer file.Close()
	text, err := io.ReadAll(io.LimitReader(file, MaxText+1))
	if err != nil {
		return nil, fmt.Errorf("survey: checkpoint: %w", err)
	}
	if len(text) > MaxText {
		return nil, fmt.Errorf("survey: checkpoint %s: want at most %d bytes: %w", c.name, MaxText, ErrTooLarge)
	}
	return text, nil
}

// write replaces the file in one step: a reader, or a run after a kill, finds
// the old contents or the new. The file and its folder are synchronised, so that this also holds
// when the machine goes down.
func (c checkpoint) write(v any) error {
	text, err := json.Marshal(v)
	if err == nil {
		err = c.replace(append(text, '\n'))
	}
	if err != nil {
		return fmt.Errorf("survey: checkpoint %s: %w", c.name, err)
	}
	return nil
}

func (c checkpoint) replace(text []byte) error {
	folder := filepath.Dir(c.name)
	file, err := os.CreateTemp(folder, filepath.Base(c.name)+".*.tmp")
	if err != nil {
		return err
	}
	_, err = file.Write(text)
	if err == nil {
		err = file.Sync()
	}
	if e := file.Close(); err == nil {
		err = e
	}
	if err == nil {
		err = os.Rename(file.Name(), c.name)
	}
	if err != nil {
		os.Remove(file.Name())
		return err
	}
	// Not every system lets folders be synchronised; the file is whole anyway.
	if d, err := os.Open(folder); err == nil {
		_ = d.Sync()
		d.Close()
	}
	return nil
}
