package casefile

import (
	"bytes"
	"flag"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "write the golden files anew")

// golden compares text with a file.
func golden(t *testing.T, file, got string) {
	t.Helper()
	if *update {
		if err := os.WriteFile(file, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	if got != string(want) {
		t.Errorf("%s differs; got:\n%s", file, got)
	}
}

func formatted(findings []Finding) string {
	var b bytes.Buffer
	Format(&b, findings, false)
	return b.String()
}

func read(t *testing.T, file string) []byte {
	t.Helper()
	data, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	return data
}

// made holds the files that are better made than stored.
var made = map[string]string{
	"E-101": "title: " + strings.Repeat("x", maxBytes) + "\n",
	"E-313": "title: Many\nremarks:\n" + strings.Repeat("  - x\n", maxItems+1),
	"E-199": "title: Many\n" + manyKeys(150),
}

func manyKeys(n int) string {
	var b strings.Builder
	for i := range n {
		b.WriteString(strings.Repeat("x", i+20) + ": 1\n")
	}
	return b.String()
}

// Every code has a file that provokes it, and a golden text of what is printed.
func TestEveryCode(t *testing.T) {
	for _, code := range Codes() {
		t.Run(code, func(t *testing.T) {
			var data []byte
			if text, ok := made[code]; ok {
				data = []byte(text)
			} else {
				data = read(t, filepath.Join("testdata", "codes", code+".yaml"))
			}
			var d Defaults
			if code == "E-415" {
				d.Air = "40 W"
			}
			f, findings := Read(code+".yaml", data, d)
			if !slices.ContainsFunc(findings, func(f Finding) bool { return f.Code == code }) {
				t.Errorf("no %s in:\n%s", code, formatted(findings))
			}
			if (f == nil) != HasErrors(findings) {
				t.Errorf("file %v with findings:\n%s", f != nil, formatted(findings))
			}
			if code == "E-199" {
				findings = findings[len(findings)-1:]
			}
			for _, f := range findings {
				complete(t, f)
			}
			golden(t, filepath.Join("testdata", "codes", code+".txt"), formatted(findings))
		})
	}
}

// complete checks what every finding must say.
func complete(t *testing.T, f Finding) {
	t.Helper()
	if f.Line < 1 || f.Column < 1 || f.Width < 1 || f.Message == "" || f.Found == "" || f.Expected == "" || f.File == "" {
		t.Errorf("incomplete finding %+v", f)
	}
	if text, ok := Explain(f.Code); !ok || len(text) < 40 {
		t.Errorf("%s is not explained", f.Code)
	}
	if (f.Severity == Warning) != strings.HasPrefix(f.Code, "E-5") {
		t.Errorf("%s has severity %v", f.Code, f.Severity)
	}
}

// Ten mistakes give ten findings, each at its place.
func TestTenMistakes(t *testing.T) {
	f, findings := Read("ten-mistakes.yaml", read(t, "testdata/ten-mistakes.yaml"), Defaults{})
	if f != nil || len(findings) != 10 {
		t.Errorf("%d findings, want 10", len(findings))
	}
	golden(t, "testdata/ten-mistakes.txt", formatted(findings))
}

func TestFormatColour(t *testing.T) {
	f := Finding{Code: "E-201", File: "a.yaml", Line: 3, Column: 3, Width: 4, Source: "\twidht: \x1b[2J1", Message: "m", Found: "f", Expected: "e"}
	var b bytes.Buffer
	Format(&b, []Finding{f}, true)
	if !strings.Contains(b.String(), "\x1b[31m^^^^\x1b[0m") || strings.Contains(b.String(), "[2J1\x1b") || strings.Contains(b.String(), "\x1b[2J") {
		t.Errorf("%q", b.String())
	}
}

// A long line is cut around the mark.
func TestFormatLongLine(t *testing.T) {
	line := strings.Repeat("a", 300) + "XYZ" + strings.Repeat("b", 300)
	var b bytes.Buffer
	Format(&b, []Finding{{Code: "E-103", File: "a", Line: 1, Column: 301, Width: 3, Source: line, Message: "m"}}, false)
	rows := strings.Split(b.String(), "\n")
	at := strings.Index(rows[2], "^^^")
	if len([]rune(rows[1])) > excerptWidth+20 || string([]rune(rows[1])[at:at+3]) != "XYZ" {
		t.Errorf("%s", b.String())
	}
}
