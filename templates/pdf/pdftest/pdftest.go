// Package pdftest lets tests look at a PDF with the readers of other people.
package pdftest

import (
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
)

// Tool runs an external program and gives what it prints; FILE in its arguments
// stands for the document. A test is skipped where the program is missing, since
// a bare machine has none of them, but fails under CI, which installs them.
func Tool(t *testing.T, doc []byte, name string, args ...string) string {
	t.Helper()
	if _, err := exec.LookPath(name); err != nil {
		if os.Getenv("CI") == "" {
			t.Skipf("%s is not installed", name)
		}
		t.Fatal(err)
	}
	file := filepath.Join(t.TempDir(), "doc.pdf")
	if err := os.WriteFile(file, doc, 0o600); err != nil {
		t.Fatal(err)
	}
	for i, a := range args {
		args[i] = strings.ReplaceAll(a, "FILE", file)
	}
	out, err := exec.Command(name, args...).CombinedOutput()
	if err != nil {
		t.Fatalf("%s: %v\n%s", name, err, out)
	}
	return string(out)
}
