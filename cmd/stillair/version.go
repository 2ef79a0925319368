package main

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"runtime"
	"runtime/debug"

	"github.com/spf13/cobra"

	"stillair/checks"
	"stillair/checks/limit"
	"stillair/checks/material"
	"stillair/freeconv"
	"stillair/radiation"
)

// version is set by a release build; otherwise the build information tells.
var version = ""

func (a *app) versionCommand() *cobra.Command {
	return &cobra.Command{
		Use:               "version",
		Short:             "Show the version of program and data",
		Example:           "  stillair version",
		Args:              takes(0, 0, ""),
		ValidArgsFunction: cobra.NoFileCompletions,
		RunE: func(*cobra.Command, []string) error {
			p := thisProgram()
			return a.out.print([]byte(fmt.Sprintf("%s %s\ndata %s\n%s %s/%s\n", p.Name, p.Version, p.Data,
				runtime.Version(), runtime.GOOS, runtime.GOARCH)))
		},
	}
}

// thisProgram identifies the program and its data in every result.
func thisProgram() checks.Program {
	return checks.Program{Name: "stillair", Version: programVersion(), Data: dataVersion()}
}

func programVersion() string {
	if version != "" {
		return version
	}
	if info, ok := debug.ReadBuildInfo(); ok && info.Main.Version != "" {
		return info.Main.Version
	}
	return "(devel)"
}

// dataVersion is a short hash over the tables and the catalogue of methods: it
// changes when any number in them does.
func dataVersion() string {
	h := sha256.New()
	fmt.Fprintln(h, radiation.DataVersion(), material.DataVersion(), limit.DataVersion())
	for _, c := range freeconv.All() {
		fmt.Fprintln(h, c.ID, c.Citation, c.Equation, c.RaMin, c.RaMax, c.PrMin, c.PrMax, c.Scatter)
	}
	return hex.EncodeToString(h.Sum(nil))[:12]
}
