package main

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"testing"

	"stillair/checks"
	"stillair/checks/casefile"
)

// exploding is an input that makes the program panic.
type exploding struct{}

func (exploding) Read([]byte) (int, error) { panic("boom") }

func testApp(in io.Reader, args ...string) (a *app, stdout, stderr *bytes.Buffer) {
	stdout, stderr = &bytes.Buffer{}, &bytes.Buffer{}
	return &app{args: args, in: in, out: &output{stdout: stdout}, err: stderr}, stdout, stderr
}

func TestPanicIsExitThree(t *testing.T) {
	a, stdout, stderr := testApp(exploding{}, "check", "-", "--json")
	if code := a.execute(); code != exitFault {
		t.Errorf("exit code %d, want %d", code, exitFault)
	}
	if !strings.Contains(stderr.String(), "fault of its own: boom") {
		t.Errorf("message: %s", stderr)
	}
	wantError(t, stdout.Bytes(), "fault")
}

// broken fails after some reads.
type broken struct{}

func (broken) Read([]byte) (int, error) { return 0, errors.New("cable cut") }

func TestReadFaultIsExitThree(t *testing.T) {
	a, stdout, stderr := testApp(broken{}, "check", "-", "--json")
	if code := a.execute(); code != exitFault {
		t.Errorf("exit code %d, want %d", code, exitFault)
	}
	if !strings.Contains(stderr.String(), "standard input") || !strings.Contains(stderr.String(), "cable cut") {
		t.Errorf("message: %s", stderr)
	}
	wantError(t, stdout.Bytes(), "io")
}

// full is a standard output that takes nothing.
type full struct{}

func (full) Write([]byte) (int, error) { return 0, errors.New("disk full") }

func TestWriteFaultIsExitThree(t *testing.T) {
	for _, args := range [][]string{{"check", "-"}, {"check", "-", "--json"}, {"version"}, {"finishes"}, {"--help"}, {"help", "check"}} {
		a, _, stderr := testApp(strings.NewReader(plateCase), args...)
		a.out.stdout = full{}
		if code := a.execute(); code != exitFault {
			t.Errorf("%v: exit code %d, want %d", args, code, exitFault)
		}
		if !strings.Contains(stderr.String(), "disk full") {
			t.Errorf("%v: message %q", args, stderr)
		}
	}
}

const plateCase = `title: Plate
surroundings: {air: 20 °C}
body:
  plate: {width: 500 mm, height: 500 mm, emissivity: 0.9}
heat: 50 W
`

func wantError(t *testing.T, data []byte, code string) {
	t.Helper()
	var got struct {
		Schema string
		Error  struct{ Code, Message string }
	}
	if err := json.Unmarshal(data, &got); err != nil {
		t.Fatalf("standard output is not one object: %v\n%s", err, data)
	}
	if got.Schema != "stillair.check/1" || got.Error.Code != code || got.Error.Message == "" {
		t.Errorf("object %+v, want code %s", got, code)
	}
}

// TestInterrupt stops the real program while it waits for its input.
func TestInterrupt(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Log("no interrupt signal to send to another process")
		return
	}
	cmd := exec.Command("stillair", "check", "-", "--json", "-o", filepath.Join(t.TempDir(), "out.json"))
	stdin, err := cmd.StdinPipe()
	if err != nil {
		t.Fatal(err)
	}
	var stdout bytes.Buffer
	cmd.Stdout = &stdout
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	// More than a pipe holds: when the write returns, the program is reading
	// and its signal handler stands.
	if _, err := stdin.Write(bytes.Repeat([]byte("# waiting\n"), 20000)); err != nil {
		t.Fatal(err)
	}
	if err := cmd.Process.Signal(os.Interrupt); err != nil {
		t.Fatal(err)
	}
	var status *exec.ExitError
	if err := cmd.Wait(); !errors.As(err, &status) || status.ExitCode() != exitInterrupted {
		t.Errorf("ended with %v, want exit code %d", err, exitInterrupted)
	}
	wantError(t, stdout.Bytes(), "interrupted")
}

func TestNothingLeavesAfterClose(t *testing.T) {
	var b bytes.Buffer
	o := &output{stdout: &b}
	if !o.close() {
		t.Error("an untouched output calls itself touched")
	}
	path := filepath.Join(t.TempDir(), "x")
	if o.print([]byte("x")) == nil || o.save(path, []byte("x")) == nil || b.Len() > 0 {
		t.Error("output after close")
	}
	if _, err := os.Stat(path); err == nil {
		t.Error("file after close")
	}
}

func TestSaveKeepsTheOldFileWhenItFails(t *testing.T) {
	dir := t.TempDir()
	old := filepath.Join(dir, "old")
	if err := os.WriteFile(old, []byte("old"), 0o600); err != nil {
		t.Fatal(err)
	}
	o := &output{stdout: io.Discard}
	if err := o.save(old, []byte("new")); err != nil {
		t.Fatal(err)
	}
	if got, _ := os.ReadFile(old); string(got) != "new" {
		t.Errorf("file holds %q", got)
	}
	if info, _ := os.Stat(old); info.Mode().Perm() != 0o600 {
		t.Errorf("mode changed to %v", info.Mode())
	}
	if err := o.save(filepath.Join(dir, "missing", "x"), nil); asFailure(err).exit != exitFault {
		t.Errorf("missing folder: %v", err)
	}
	if err := o.save(dir, nil); asFailure(err).exit != exitInput {
		t.Errorf("a folder: %v", err)
	}
	if entries, _ := os.ReadDir(dir); len(entries) != 1 {
		t.Errorf("temporary files left: %v", entries)
	}
}

func TestSaveFollowsLinksAndDevices(t *testing.T) {
	dir := t.TempDir()
	o := &output{stdout: io.Discard}
	link := filepath.Join(dir, "link")
	if err := os.Symlink(filepath.Join(dir, "real"), link); err != nil {
		t.Log("no symbolic links here")
		return
	}
	if err := os.WriteFile(filepath.Join(dir, "real"), nil, 0o644); err != nil {
		t.Fatal(err)
	}
	if err := o.save(link, []byte("x")); err != nil {
		t.Fatal(err)
	}
	if got, _ := os.ReadFile(filepath.Join(dir, "real")); string(got) != "x" {
		t.Error("the link was replaced instead of followed")
	}
	if err := o.save(os.DevNull, []byte("x")); err != nil {
		t.Errorf("null device: %v", err)
	}
	if info, err := os.Stat(os.DevNull); err != nil || info.Mode().IsRegular() {
		t.Error("the null device was replaced by a file")
	}
}

func TestExitOf(t *testing.T) {
	good := checks.LoadOutcome{Status: checks.Converged}
	for verdict, want := range map[checks.Verdict]int{
		checks.Pass: exitPass, checks.ConditionalPass: exitPass, checks.None: exitPass,
		checks.ConditionalFail: exitLimit, checks.Fail: exitLimit, checks.NoResult: exitInput, "something new": exitInput,
	} {
		if got := exitOf(&checks.Outcome{Verdict: verdict, Loads: []checks.LoadOutcome{good}}); got != want {
			t.Errorf("%s: exit code %d, want %d", verdict, got, want)
		}
	}
	for _, s := range []checks.Status{checks.NotConverged, checks.Impossible, checks.OutOfProperties} {
		o := &checks.Outcome{Verdict: checks.Pass, Loads: []checks.LoadOutcome{good, {Status: s}}}
		if got := exitOf(o); got != exitInput {
			t.Errorf("%s beside a pass: exit code %d, want %d", s, got, exitInput)
		}
	}
}

func TestNearest(t *testing.T) {
	words := []string{"check", "completion", "note", "zsh", "fish", "--json"}
	for typed, want := range map[string]string{
		"chek": "check", "CHECK": "check", "hceck": "check", "compl": "completion", "note": "note",
		"fsh": "fish", "--jsn": "--json", "volcano": "", "x": "",
	} {
		if got := nearest(typed, words); got != want {
			t.Errorf("nearest(%q) = %q, want %q", typed, got, want)
		}
	}
}

func TestDescribeMarksTheWord(t *testing.T) {
	f := casefile.Finding{Code: "E-1", File: "a.yaml", Line: 3, Column: 4, Width: 5, Source: "\t°° widht: 1\x1b[2J", Message: "m"}
	got := describe(f)
	want := "a.yaml:3:4: error E-1: m\n    3 | \t°° widht: 1\uFFFD[2J\n      | \t  ^^^^^\n"
	if !strings.HasPrefix(got, want) {
		t.Errorf("got:\n%q\nwant:\n%q", got, want)
	}
}

func TestExitCodesAreExplained(t *testing.T) {
	text := exitCodesTopic().Long
	for _, e := range exitMeaning {
		if !strings.Contains(text, strings.SplitN(e.meaning, "\n", 2)[0]) {
			t.Errorf("code %d is not explained", e.code)
		}
	}
}

func TestEveryCodeIsExplained(t *testing.T) {
	for _, code := range allCodes() {
		if text, ok := explain(code); !ok || strings.TrimSpace(text) == "" {
			t.Errorf("%s has no explanation", code)
		}
	}
}

// The case and the settings that the README shows are ones the program takes.
func TestReadmeExamples(t *testing.T) {
	readme, err := os.ReadFile("../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	blocks := strings.Split(string(readme), "```yaml\n")
	if len(blocks) != 3 {
		t.Fatalf("%d YAML blocks in the README, want a case and settings", len(blocks)-1)
	}
	text := func(block string) []byte { return []byte(block[:strings.Index(block, "```")]) }
	example := string(text(blocks[1]))
	for heat, want := range map[string]checks.Verdict{"heat: 60 W": checks.Pass, "heat: 120 W": checks.Fail} {
		f, found := casefile.Read("README.md", []byte(strings.Replace(example, "heat: 60 W", heat, 1)), casefile.Defaults{})
		if f == nil || len(found) > 0 {
			t.Fatalf("case: %v", found)
		}
		if got := checks.Run(f, thisProgram()).Verdict; got != want {
			t.Errorf("with %s the example ends in %s, the README says %s", heat, got, want)
		}
	}
	if found := checkSettingsFile("README.md", text(blocks[2])); len(found) > 0 {
		t.Errorf("settings: %v", found)
	}
}
