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

// release is the number of the version under work. A release build may set
// version instead; otherwise the build information adds the revision.
const release = "0.1.0"

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
	if info, ok := debug.ReadBuildInfo(); ok {
		return versionFrom(info)
	}
	return release
}

// versionFrom is the release number with the revision it was built from:
// "0.1.0+0123456789ab,modified". Without version control it is a tagged module
// version or the release number alone.
func versionFrom(info *debug.BuildInfo) string {
	built := map[string]string{}
	for _, s := range info.Settings {
		built[s.Key] = s.Value
	}
	revision := built["vcs.revision"]
	switch {
	case revision != "":
		text := release + "+" + revision[:min(12, len(revision))]
		if built["vcs.modified"] == "true" {
			text += ",modified"
		}
		return text
	case info.Main.Version != "" && info.Main.Version != "(devel)":
		return info.Main.Version
	}
	return release
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
