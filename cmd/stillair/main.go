// Command stillair tells whether a thing that must shed its heat without a
// fan will do so: it reads a case file, solves the heat balance, judges the
// temperatures against limits and writes a report or a calculation note.
package main

import (
	"cmp"
	"fmt"
	"io"
	"os"
	"os/signal"
	"slices"
	"syscall"

	"golang.org/x/term"

	"stillair/checks"
)

func main() { os.Exit(run(os.Args[1:])) }

// app is one run of the program.
type app struct {
	args    []string
	in      io.Reader
	out     *output
	err     io.Writer
	wide    int  // characters across standard output; 0 when it is no terminal
	noColor bool // asked for on the command line
	file    string
	warned  bool // of variables of the environment
}

// run executes the command line and gives the exit code.
func run(args []string) int {
	a := &app{args: args, in: os.Stdin, out: &output{stdout: os.Stdout}, err: os.Stderr, wide: terminalWidth()}
	stop := make(chan os.Signal, 1)
	signal.Notify(stop, os.Interrupt, syscall.SIGTERM)
	done := make(chan int, 1)
	go func() { done <- a.execute() }()
	select {
	case code := <-done:
		return code
	case <-stop:
		return a.interrupted()
	}
}

// terminalWidth is 0 when standard output is not a terminal.
func terminalWidth() int {
	if width, _, err := term.GetSize(int(os.Stdout.Fd())); err == nil {
		return width
	}
	return 0
}

// execute runs the command; a panic becomes a plain message and exit code 3.
func (a *app) execute() (code int) {
	defer func() {
		if p := recover(); p != nil {
			code = a.fail(&failure{exit: exitFault, kind: "fault",
				message: fmt.Sprintf("The program met a fault of its own: %v.", p),
				help:    "Nothing was left half-written. Please report it with the case file."})
		}
	}()
	root := a.root()
	root.SetArgs(a.args)
	root.SetIn(a.in)
	root.SetOut(a.out)
	root.SetErr(a.err)
	err := cmp.Or(root.Execute(), a.out.lost)
	if err == nil {
		return exitPass
	}
	if v, ok := err.(verdictExit); ok {
		return int(v)
	}
	return a.fail(asFailure(err))
}

// fail tells what went wrong: in words on standard error, and with --json as
// the one object on standard output.
func (a *app) fail(f *failure) int {
	for _, x := range f.findings {
		fmt.Fprintln(a.err, describe(x))
	}
	fmt.Fprintln(a.err, "stillair: "+printable(f.message))
	if f.help != "" {
		fmt.Fprintln(a.err, "  "+printable(f.help))
	}
	if a.wantsJSON() && !a.out.wrote {
		if err := a.out.print(errorJSON(f)); err != nil {
			fmt.Fprintln(a.err, "stillair: "+err.Error())
			return exitFault
		}
	}
	return f.exit
}

// interrupted ends a run that was stopped from outside.
func (a *app) interrupted() int {
	f := &failure{exit: exitInterrupted, kind: "interrupted", message: "Interrupted. No file was left half-written."}
	untouched := a.out.close()
	fmt.Fprintln(a.err, "stillair: "+f.message)
	if untouched && a.wantsJSON() {
		_, _ = a.out.stdout.Write(errorJSON(f)) // the exit code says it too
	}
	return exitInterrupted
}

// wantsJSON looks at the words typed, because the promise holds for command
// lines that cannot be understood as well.
func (a *app) wantsJSON() bool {
	words := a.args
	if i := slices.Index(words, "--"); i >= 0 {
		words = words[:i]
	}
	return slices.Contains(words, "--json") || slices.Contains(words, "--json=true")
}

// color tells whether standard output may carry colour.
func (a *app) color() bool {
	return a.wide > 0 && !a.noColor && os.Getenv("NO_COLOR") == "" && os.Getenv("TERM") != "dumb"
}

// errorJSON is the versioned object of a run without a result.
func errorJSON(f *failure) []byte {
	type body struct {
		Code     string    `json:"code"`
		ExitCode int       `json:"exit_code"`
		Message  string    `json:"message"`
		Help     string    `json:"help,omitempty"`
		Findings []finding `json:"findings"`
	}
	data, err := checks.JSON(struct {
		Schema string `json:"schema"`
		Error  body   `json:"error"`
	}{resultSchema, body{f.kind, f.exit, f.message, f.help, findingsJSON(f.findings)}})
	if err != nil {
		return []byte("{}\n")
	}
	return data
}
