package main

import (
	"bytes"
	"fmt"
	"reflect"
	"text/tabwriter"

	"github.com/spf13/cobra"
)

func (a *app) settingsCommand() *cobra.Command {
	cmd := &cobra.Command{
		Use:               "settings",
		Short:             "Show every setting, its value and where it came from",
		Example:           "  stillair settings\n  STILLAIR_UNITS=US stillair settings",
		Args:              takes(0, 0, ""),
		ValidArgsFunction: cobra.NoFileCompletions,
		RunE: func(cmd *cobra.Command, _ []string) error {
			s, err := a.loadSettings(cmd.Flags())
			if err != nil {
				return err
			}
			return a.out.print(a.settingsTable(s))
		},
	}
	cmd.Long = `Settings hold what is the same for all cases of a person or company. A later layer wins:
defaults, settings file, environment (STILLAIR_UNITS ...), flags. A case file that gives a
value wins over settings file and environment. The settings file is YAML, "key: text".`
	addSettingFlags(cmd, settingKeys()...)
	return cmd
}

func (a *app) settingsTable(s *settings) []byte {
	path := a.file
	if path == "" {
		path = defaultSettingsPath()
	}
	if path == "" {
		path = "none: the system names no configuration folder"
	}
	var b bytes.Buffer
	fmt.Fprintf(&b, "Settings file: %s\n\n", path)
	w := tabwriter.NewWriter(&b, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "setting\tvalue\tfrom\tmeaning")
	for _, x := range allSettings {
		fmt.Fprintf(w, "%s\t%s\t%s\t%s\n", x.key, printable(s.value(x.key)), s.from[x.key], x.help)
	}
	_ = w.Flush() // into memory
	return b.Bytes()
}

// value is the value of a setting by its key; "-" when nothing is set.
func (s *settings) value(key string) string {
	v := reflect.ValueOf(*s)
	for i := range v.NumField() {
		if v.Type().Field(i).Tag.Get("mapstructure") == key && v.Field(i).String() != "" {
			return v.Field(i).String()
		}
	}
	return "-"
}
