package main

import (
	"errors"
	"fmt"

	"stillair/checks"
	"stillair/checks/casefile"
)

// The exit codes: one meaning each, the same for every command. This is the
// only place that gives them their meaning; "stillair help exit-codes" prints
// it.
const (
	exitPass        = 0
	exitLimit       = 1
	exitInput       = 2
	exitFault       = 3
	exitInterrupted = 130
)

// exitMeaning says in words what each code means.
var exitMeaning = []struct {
	code    int
	meaning string
}{
	{exitPass, "Every limit is met. A conditional pass and a case without limits count as met,\nand are printed as such."},
	{exitLimit, "A limit is not met: fail, or conditional fail (by less than the uncertainty).\nEverything asked for was written."},
	{exitInput, "The input or the command line is wrong, or a load case has no solution, did not\nconverge or left the range of the air properties. No file was written."},
	{exitFault, "A fault of the program, or reading or writing failed. No file was left half-written."},
	{exitInterrupted, "Interrupted (Ctrl-C). No file was left half-written."},
}

// failure is an error with its exit code and what a person or a program needs
// to put it right.
type failure struct {
	exit     int
	kind     string // one word for programs: "usage", "input", "io", "fault", "interrupted"
	message  string // sentences that stand alone
	help     string // one more sentence, or ""
	findings []casefile.Finding
}

func (f *failure) Error() string { return f.message }

// usageError is a command line that cannot be understood.
func usageError(help, format string, a ...any) error {
	return &failure{exit: exitInput, kind: "usage", message: fmt.Sprintf(format, a...), help: help}
}

// inputError is an input that can be read but not used.
func inputError(help, format string, a ...any) error {
	return &failure{exit: exitInput, kind: "input", message: fmt.Sprintf(format, a...), help: help}
}

// ioError is a failed read or write; step says of what.
func ioError(step string, err error) error {
	return &failure{exit: exitFault, kind: "io", message: fmt.Sprintf("%s: %v.", step, err)}
}

// verdictExit ends a command that did its work with a code other than 0.
type verdictExit int

func (v verdictExit) Error() string { return fmt.Sprintf("exit %d", int(v)) }

// verdictError turns the verdict of an outcome into the end of a command.
func verdictError(o *checks.Outcome) error {
	if code := exitOf(o); code != exitPass {
		return verdictExit(code)
	}
	return nil
}

func exitOf(o *checks.Outcome) int {
	for _, l := range o.Loads {
		if l.Status != checks.Converged {
			return exitInput
		}
	}
	switch o.Verdict {
	case checks.Pass, checks.ConditionalPass, checks.None, checks.NotJudged:
		return exitPass
	case checks.Fail, checks.ConditionalFail:
		return exitLimit
	}
	return exitInput
}

// asFailure gives any error an exit code. What nobody expected is a fault.
func asFailure(err error) *failure {
	var f *failure
	if errors.As(err, &f) {
		return f
	}
	return &failure{exit: exitFault, kind: "fault", message: err.Error()}
}
