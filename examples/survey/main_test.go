package main

import (
	"bytes"
	"context"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

func TestSurveyWritesItsReport(t *testing.T) {
	dir := t.TempDir()
	args := []string{"-weights", "2,0,1", "-digits", "200", "-checkpoint", filepath.Join(dir, "checkpoint"),
		"-out", filepath.Join(dir, "report.txt"), "-json", filepath.Join(dir, "report.json")}
	var out, messages bytes.Buffer
	if err := run(context.Background(), args, &out, &messages); err != nil {
		t.Fatal(err)
	}
	report, err := os.ReadFile(filepath.Join(dir, "report.txt"))
	if err != nil {
		t.Fatal(err)
	}
	if !strings.HasSuffix(out.String(), string(report)) || !strings.Contains(string(report), "4489 at -4/3 6/7") {
		t.Errorf("report: %s", report)
	}
	text, err := os.ReadFile(filepath.Join(dir, "report.json"))
	if err != nil || !json.Valid(text) {
		t.Errorf("report as JSON: %v", err)
	}
	// A second run goes on from the checkpoint, where all is done, and says the same.
	var again bytes.Buffer
	if err := run(context.Background(), args, &again, &messages); err != nil || again.String() != out.String() {
		t.Errorf("second run: %v, %s", err, again.String())
	}
	if !strings.Contains(messages.String(), "million slopes/s") {
		t.Errorf("no progress: %q", messages.String())
	}
}

func TestSurveyRefuses(t *testing.T) {
	for _, args := range [][]string{{"-weights", "-1,0,0"}, {"-digits", "99999999"}, {"-memory", "1"}, {"-nothing"}, {"-out", "/no/folder/x", "-digits", "3"}} {
		if err := run(context.Background(), args, &bytes.Buffer{}, &bytes.Buffer{}); err == nil {
			t.Errorf("%q is accepted", args)
		}
	}
}
