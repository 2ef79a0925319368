package main

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"stillair/checks"
	"stillair/checks/casefile"
)

// resultSchema names the JSON object on standard output, result or error.
const resultSchema = checks.SchemaName

// maxCase bounds the case file: a case is a page or two.
const maxCase = 1 << 20

// readCase reads and understands a case file; "-" is standard input. With
// errors in it, all of them come back at once.
func (a *app) readCase(path string, s *settings) (*casefile.File, error) {
	name, text, err := a.caseBytes(path)
	if err != nil {
		return nil, err
	}
	f, found := casefile.Read(name, text, s.defaults())
	bad := slices.DeleteFunc(slices.Clone(found), func(x casefile.Finding) bool { return x.Severity != casefile.Error })
	if len(bad) > 0 || f == nil {
		return nil, &failure{exit: exitInput, kind: "input", findings: found,
			message: fmt.Sprintf("%s has %s; nothing was computed or written.", name, count(len(bad), "error"))}
	}
	if s.from["units"] == "flag --units" {
		for i := range f.Cases {
			f.Cases[i].Units = s.Units
		}
	}
	return f, nil
}

func (a *app) caseBytes(path string) (name string, text []byte, err error) {
	if path == "-" {
		text, err = io.ReadAll(io.LimitReader(a.in, maxCase+1))
		if err != nil {
			return "", nil, ioError("Reading standard input failed", err)
		}
		return "standard input", text, tooLong("standard input", text)
	}
	f, err := os.Open(path)
	if errors.Is(err, fs.ErrNotExist) {
		return "", nil, inputError(`"stillair new" lists starter cases to begin with.`, "There is no file %s.", path)
	}
	if err != nil {
		return "", nil, ioError("Opening the case file failed", err)
	}
	defer f.Close()
	if info, err := f.Stat(); err == nil && info.IsDir() {
		return "", nil, inputError("", "%s is a folder; a case file is expected.", path)
	}
	text, err = io.ReadAll(io.LimitReader(f, maxCase+1))
	if err != nil {
		return "", nil, ioError("Reading the case file failed", err)
	}
	return path, text, tooLong(path, text)
}

func tooLong(name string, text []byte) error {
	if len(text) > maxCase {
		return inputError("", "%s is longer than 1 MB; that is no case file.", name)
	}
	return nil
}

// keepLoads drops the load cases that were not asked for. No names keep all.
func keepLoads(f *casefile.File, names []string) error {
	if len(names) == 0 {
		return nil
	}
	var all []string
	for _, c := range f.Cases {
		all = append(all, c.Load.Name)
	}
	for _, n := range names {
		if !slices.Contains(all, n) {
			return usageError(didYouMean(n, all), "The case has no load case %q.", n)
		}
	}
	f.Cases = slices.DeleteFunc(f.Cases, func(c casefile.Case) bool { return !slices.Contains(names, c.Load.Name) })
	return nil
}

// loadNames completes the names of the load cases of the case file named
// before; settings do not change them.
func loadNames(_ *cobra.Command, args []string, _ string) ([]string, cobra.ShellCompDirective) {
	if len(args) != 1 {
		return nil, cobra.ShellCompDirectiveNoFileComp
	}
	text, err := os.ReadFile(args[0])
	if err != nil {
		return nil, cobra.ShellCompDirectiveNoFileComp
	}
	f, _ := casefile.Read(args[0], text, casefile.Defaults{Air: "20 °C"})
	var names []string
	for i := 0; f != nil && i < len(f.Cases); i++ {
		names = append(names, f.Cases[i].Load.Name)
	}
	return names, cobra.ShellCompDirectiveNoFileComp
}

// partial says which load cases a report leaves out, or "".
func partial(names []string) string {
	if len(names) == 0 {
		return ""
	}
	return "Only " + strings.Join(names, ", ") + " was computed (--load); the verdict says nothing about the other load cases."
}
