package starter_test

import (
	"os"
	"strings"
	"testing"

	"stillair/checks"
	"stillair/checks/casefile"
	"stillair/templates/starter"
)

// Every starter reads without a finding and every load case of it has a result.
func TestStartersReadAndSolve(t *testing.T) {
	for _, name := range starter.Names() {
		text, ok := starter.Get(name)
		if !ok {
			t.Fatalf("%s is missing", name)
		}
		f, found := casefile.Read(name+".yaml", text, casefile.Defaults{})
		for _, x := range found {
			t.Errorf("%s:%d:%d: %s %s", name, x.Line, x.Column, x.Code, x.Message)
		}
		if f == nil {
			continue
		}
		for _, l := range checks.Run(f, checks.Program{}).Loads {
			if l.Status != checks.Converged {
				t.Errorf("%s, %s: %s: %s", name, l.Name, l.Status, l.Message)
			}
		}
	}
}

// The README's main command and the starter that teaches failure keep their
// verdicts.
func TestVerdictsTheReadmeTells(t *testing.T) {
	for name, want := range map[string][]checks.Verdict{
		"indoor-panel": {checks.ConditionalPass},
		"steam-pipe":   {checks.Pass, checks.ConditionalPass},
		"panel":        {checks.Fail},
		"bare-pipe":    {checks.Fail},
	} {
		text, _ := starter.Get(name)
		f, _ := casefile.Read(name, text, casefile.Defaults{})
		if f == nil {
			t.Fatalf("%s does not read", name)
		}
		got := checks.Run(f, checks.Program{}).Verdict
		if got != want[0] && got != want[len(want)-1] {
			t.Errorf("%s: %s, want %v", name, got, want)
		}
	}
}

// Every starter points editors to the schema and says what it is.
func TestStartersBeginWithTheSchema(t *testing.T) {
	for _, name := range starter.Names() {
		text, _ := starter.Get(name)
		lines := strings.Split(string(text), "\n")
		if lines[0] != "# yaml-language-server: $schema=stillair.schema.json" {
			t.Errorf("%s begins with %q", name, lines[0])
		}
		if !strings.HasPrefix(lines[2], "# Starter case: ") {
			t.Errorf("%s does not say what it is", name)
		}
	}
}

func TestKindsAndFilesAgree(t *testing.T) {
	entries, err := os.ReadDir(".")
	if err != nil {
		t.Fatal(err)
	}
	n := 0
	for _, e := range entries {
		if name, ok := strings.CutSuffix(e.Name(), ".yaml"); ok {
			n++
			if _, found := starter.Get(name); !found {
				t.Errorf("%s is not embedded", e.Name())
			}
		}
	}
	if n != len(starter.Names()) {
		t.Errorf("%d files, %d names", n, len(starter.Names()))
	}
	for _, bad := range []string{"", "../starter", "panel.yaml", "volcano"} {
		if _, ok := starter.Get(bad); ok {
			t.Errorf("Get(%q) finds something", bad)
		}
	}
}

// The schema beside the starters is the one the program prints.
func TestSchemaFileIsUpToDate(t *testing.T) {
	got, err := os.ReadFile("stillair.schema.json")
	if err != nil || string(got) != string(casefile.Schema()) {
		t.Errorf("run go generate ./templates/starter (%v)", err)
	}
}
