package main

import (
	"bytes"
	_ "embed"
	"html/template"
	"os"
	"path/filepath"
)

//go:embed page.html
var pageSource string

var pageTemplate = template.Must(template.New("page").Parse(pageSource))

// page is the dossier as one XHTML page that needs nothing else.
func (d *dossier) page() ([]byte, error) {
	var b bytes.Buffer
	if err := pageTemplate.Execute(&b, d); err != nil {
		return nil, err
	}
	return b.Bytes(), nil
}

// write writes the page and the text into the folder.
func (d *dossier) write(folder, text string) error {
	page, err := d.page()
	if err != nil {
		return err
	}
	if err := os.WriteFile(filepath.Join(folder, "dossier.html"), page, 0o644); err != nil {
		return err
	}
	return os.WriteFile(filepath.Join(folder, "dossier.txt"), []byte(text), 0o644)
}
