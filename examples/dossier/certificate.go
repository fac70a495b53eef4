package main

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"example.com/onecusp/orbifold"
)

// maxShownBytes bounds the certificates that the page shows in full.
const maxShownBytes = 24 << 10

// writeCertificates writes a certificate for each entry that has one into the folder,
// reads it back and verifies what was read.
func (d *dossier) writeCertificates(ctx context.Context, folder string) error {
	if err := os.MkdirAll(folder, 0o755); err != nil {
		return err
	}
	for _, e := range d.Entries {
		s := section{Title: "Certificate"}
		if !e.held {
			s.Remark = "None: the number is too large."
			e.Sections = append(e.Sections, s)
			continue
		}
		name := e.certificateName()
		text, err := json.MarshalIndent(e.certificate, "", "  ")
		if err != nil {
			return err
		}
		file := filepath.Join(folder, name)
		if err := os.WriteFile(file, append(text, '\n'), 0o644); err != nil {
			return err
		}
		if err := readBack(ctx, file); err != nil {
			return fmt.Errorf("certificate %s: %w", file, err)
		}
		s.add("File", "%s", name)
		s.say("Read back and verified", "yes: every field was computed again from the weights and the slope, and is right")
		s.Remark = fmt.Sprintf("%d bytes of JSON. A program that has exact integers, and nothing of this library, can check it: replay the exchange "+
			"rule along the path, take the continuant of the word's runs, test that N divides y² + ky + 1.", len(text))
		if len(text) <= maxShownBytes {
			s.Folded = string(text)
		}
		e.Sections = append(e.Sections, s)
	}
	return nil
}

// readBack is what a referee would do with a certificate file.
func readBack(ctx context.Context, file string) error {
	text, err := os.ReadFile(file)
	if err != nil {
		return err
	}
	var c orbifold.Certificate
	if err := json.Unmarshal(bytes.TrimSpace(text), &c); err != nil {
		return err
	}
	return c.VerifyContext(ctx)
}

// certificateName is the name of a certificate's file. A slope whose number can be held
// has few digits.
func (e *entry) certificateName() string {
	return "certificate-" + strings.NewReplacer("/", "_", "-", "minus-").Replace(e.Slope.String()) + ".json"
}

// certificates counts the entries that have one.
func (d *dossier) certificates() int {
	n := 0
	for _, e := range d.Entries {
		if e.held {
			n++
		}
	}
	return n
}
