package main

import (
	"bufio"
	"encoding/json"
	"errors"
	"image"
	"image/png"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
	"github.com/spf13/cobra"

	"stillair/templates/starter"
)

// TestMain lets the test binary stand in for the program, so that the stories
// run the real command line with real exit codes.
func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"stillair": main})
}

// TestStories runs one text file per story out of the engineer's day.
func TestStories(t *testing.T) {
	testscript.Run(t, testscript.Params{
		Dir:                 "testdata/script",
		RequireExplicitExec: true,
		Setup:               func(e *testscript.Env) error { e.Setenv("XDG_CONFIG_HOME", e.WorkDir+"/config"); return nil },
		Cmds: map[string]func(*testscript.TestScript, bool, []string){
			"exits":    exits,
			"onejson":  oneJSON,
			"nofiles":  noFiles,
			"messages": messages,
			"plain":    plain,
			"makepng":  makePNG,
			"pdfhas":   pdfHas,
		},
	})
}

// exits runs a command and wants one exit code: exits 2 stillair check x.yaml
func exits(ts *testscript.TestScript, _ bool, args []string) {
	want, err := strconv.Atoi(args[0])
	ts.Check(err)
	err = ts.Exec(args[1], args[2:]...)
	got := 0
	var status *exec.ExitError
	switch {
	case errors.As(err, &status):
		got = status.ExitCode()
	case err != nil:
		ts.Fatalf("%v", err)
	}
	if got != want {
		ts.Fatalf("exit code %d, want %d", got, want)
	}
}

// oneJSON wants exactly one object on standard output, with a schema, and the
// value at a path when one is named: onejson error.code usage
func oneJSON(ts *testscript.TestScript, _ bool, args []string) {
	d := json.NewDecoder(strings.NewReader(ts.ReadFile("stdout")))
	var object map[string]any
	ts.Check(d.Decode(&object))
	if d.More() {
		ts.Fatalf("more than one object on standard output")
	}
	if object["schema"] != "stillair.check/1" {
		ts.Fatalf("schema %v", object["schema"])
	}
	if len(args) < 2 {
		return
	}
	var at any = object
	for _, key := range strings.Split(args[0], ".") {
		m, ok := at.(map[string]any)
		if !ok {
			ts.Fatalf("no object at %s", key)
		}
		at = m[key]
	}
	if at != args[1] {
		ts.Fatalf("%s is %v, want %s", args[0], at, args[1])
	}
}

// noFiles wants a folder to hold nothing but the files named.
func noFiles(ts *testscript.TestScript, _ bool, args []string) {
	entries, err := os.ReadDir(ts.MkAbs(args[0]))
	ts.Check(err)
	allowed := " " + strings.Join(args[1:], " ") + " "
	for _, e := range entries {
		if !strings.Contains(allowed, " "+e.Name()+" ") {
			ts.Fatalf("unexpected file %s", e.Name())
		}
	}
}

// messages wants so many errors of the input, each with its place.
func messages(ts *testscript.TestScript, _ bool, args []string) {
	want, err := strconv.Atoi(args[0])
	ts.Check(err)
	got := 0
	for s := bufio.NewScanner(strings.NewReader(ts.ReadFile("stderr"))); s.Scan(); {
		if strings.Contains(s.Text(), ": error E-") {
			got++
		}
	}
	if got != want {
		ts.Fatalf("%d errors told, want %d", got, want)
	}
}

// plain wants no escape sequence and no carriage return on either stream.
func plain(ts *testscript.TestScript, _ bool, _ []string) {
	if text := ts.ReadFile("stdout") + ts.ReadFile("stderr"); strings.ContainsAny(text, "\x1b\r") {
		ts.Fatalf("escape sequence or carriage return off-terminal")
	}
}

// makePNG writes a small picture.
func makePNG(ts *testscript.TestScript, _ bool, args []string) {
	f, err := os.Create(ts.MkAbs(args[0]))
	ts.Check(err)
	ts.Check(png.Encode(f, image.NewGray(image.Rect(0, 0, 40, 10))))
	ts.Check(f.Close())
}

// pdfHas wants a text in a PDF. It needs the PDF reader pdftotext; where that is
// missing only a CI run insists.
func pdfHas(ts *testscript.TestScript, _ bool, args []string) {
	reader, err := exec.LookPath("pdftotext")
	if err != nil && os.Getenv("CI") == "" {
		ts.Logf("pdftotext is not installed: %s not looked for", args[1])
		return
	}
	ts.Check(err)
	text, err := exec.Command(reader, ts.MkAbs(args[0]), "-").Output()
	ts.Check(err)
	if !strings.Contains(string(text), args[1]) {
		ts.Fatalf("%s does not hold %q", args[0], args[1])
	}
}

// TestHelpExamples runs every example of every command in a shell. The
// commands leave with 0, or with 1 where a starter does not meet its limits.
func TestHelpExamples(t *testing.T) {
	a := &app{out: &output{stdout: os.Stdout}, in: strings.NewReader(""), err: os.Stderr}
	for _, cmd := range commandTree(a.root()) {
		t.Run(cmd.CommandPath(), func(t *testing.T) {
			if !strings.HasPrefix(strings.TrimSpace(cmd.Example), "stillair ") && !strings.Contains(cmd.Example, "stillair ") {
				t.Fatal("help does not begin with a runnable example")
			}
			dir := t.TempDir()
			if !strings.Contains(cmd.Example, "stillair new panel\n") {
				text, _ := starter.Get("panel")
				if err := os.WriteFile(filepath.Join(dir, "panel.yaml"), text, 0o644); err != nil {
					t.Fatal(err)
				}
			}
			for _, line := range strings.Split(cmd.Example, "\n") {
				runExample(t, dir, strings.TrimSpace(line))
			}
		})
	}
}

func runExample(t *testing.T, dir, line string) {
	t.Helper()
	sh := exec.Command("sh", "-c", line)
	sh.Dir = dir
	sh.Env = append(os.Environ(), "XDG_CONFIG_HOME="+dir)
	out, err := sh.CombinedOutput()
	var status *exec.ExitError
	if errors.As(err, &status) && status.ExitCode() == exitLimit {
		return
	}
	if err != nil {
		t.Errorf("%s: %v\n%s", line, err, out)
	}
	if len(out) == 0 && !strings.Contains(line, ">") && !strings.Contains(line, "-o ") {
		t.Errorf("%s: nothing said", line)
	}
}

// commandTree lists the commands a person can see, topics included.
func commandTree(c *cobra.Command) []*cobra.Command {
	list := []*cobra.Command{c}
	for _, sub := range c.Commands() {
		if !sub.Hidden {
			list = append(list, commandTree(sub)...)
		}
	}
	return list
}
