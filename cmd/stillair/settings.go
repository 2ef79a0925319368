package main

import (
	"bytes"
	"errors"
	"fmt"
	"image/png"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
	"github.com/spf13/viper"

	"stillair/checks/casefile"
	"stillair/checks/unit"
)

// settings is what a person or company sets once for all cases.
type settings struct {
	Units    string `mapstructure:"units"`
	Company  string `mapstructure:"company"`
	Logo     string `mapstructure:"logo"`
	Paper    string `mapstructure:"paper"`
	Air      string `mapstructure:"air"`
	Radiant  string `mapstructure:"radiant"`
	Altitude string `mapstructure:"altitude"`

	logo []byte            // the picture, read and checked
	from map[string]string // where each value came from, by key
}

// setting describes one of them; file check, environment, flags, listing and
// messages all read it.
type setting struct {
	key, def, help string
	values         []string // the only words allowed, when there are such
	quantity       unit.Kind
	isQuantity     bool
	isFile         bool
}

const envPrefix = "STILLAIR"

var allSettings = []setting{
	{key: "units", def: "SI", help: "units of results: SI or US; a case that names its units wins over file and environment", values: []string{"SI", "US"}},
	{key: "company", help: "legal owner in the title block of the note, when the case names none"},
	{key: "logo", help: "PNG picture for the head of the note", isFile: true},
	{key: "paper", def: "A4", help: "paper of the note: A4 or Letter", values: []string{"A4", "Letter"}},
	{key: "air", help: "air temperature for cases that give none, e.g. 40 °C", isQuantity: true, quantity: unit.Temperature},
	{key: "radiant", help: "radiant temperature for cases that give no air", isQuantity: true, quantity: unit.Temperature},
	{key: "altitude", help: "altitude for cases that give neither altitude nor pressure, e.g. 120 m", isQuantity: true, quantity: unit.Altitude},
}

func settingKeys() []string {
	keys := make([]string, len(allSettings))
	for i, s := range allSettings {
		keys[i] = s.key
	}
	return keys
}

func settingOf(key string) setting {
	return allSettings[slices.IndexFunc(allSettings, func(s setting) bool { return s.key == key })]
}

func (s setting) env() string { return envPrefix + "_" + strings.ToUpper(s.key) }

// addSettingFlags gives a command the flags of some settings. Flags win over
// everything else.
func addSettingFlags(cmd *cobra.Command, keys ...string) {
	for _, key := range keys {
		s := settingOf(key)
		cmd.Flags().Var(&word{kind: s.word()}, key, s.help)
		complete := cobra.FixedCompletions(s.values, cobra.ShellCompDirectiveNoFileComp)
		if s.isFile {
			complete = cobra.FixedCompletions([]string{"png"}, cobra.ShellCompDirectiveFilterFileExt)
		}
		_ = cmd.RegisterFlagCompletionFunc(key, complete) // fails only for a flag that was just added
	}
}

// word is the value of a setting's flag. Its type is what help shows after the
// flag.
type word struct{ text, kind string }

func (w *word) String() string     { return w.text }
func (w *word) Set(s string) error { w.text = s; return nil }
func (w *word) Type() string       { return w.kind }

// word says what kind of value a setting takes.
func (s setting) word() string {
	switch {
	case len(s.values) > 0:
		return strings.Join(s.values, "|")
	case s.isFile:
		return "FILE"
	case s.isQuantity:
		return "QUANTITY"
	}
	return "TEXT"
}

// loadSettings reads the settings: defaults, then the settings file, then the
// environment, then flags; the later wins. Every value is checked here, so
// that no command starts with a setting it cannot use.
func (a *app) loadSettings(flags *pflag.FlagSet) (*settings, error) {
	a.warnEnvironment()
	path, text, err := a.settingsFile()
	if err != nil {
		return nil, err
	}
	if found := checkSettingsFile(path, text); len(found) > 0 {
		return nil, &failure{exit: exitInput, kind: "input", message: fmt.Sprintf("The settings file %s has %s.", path, count(len(found), "error")), findings: found}
	}
	v, err := layered(text, flags)
	if err != nil {
		return nil, inputError("", "The settings file %s cannot be read: %v.", path, err)
	}
	s := &settings{from: map[string]string{}}
	if err := v.UnmarshalExact(s); err != nil {
		return nil, inputError("", "The settings cannot be used: %v.", err)
	}
	for _, x := range allSettings {
		s.from[x.key] = origin(v, x, flags, path)
	}
	return s, s.check(path, v)
}

// warnEnvironment tells about variables that look like settings and are none,
// since a misspelt one would be without effect and nobody would notice.
func (a *app) warnEnvironment() {
	if a.warned {
		return
	}
	a.warned = true
	var names []string
	for _, s := range allSettings {
		names = append(names, s.env())
	}
	for _, variable := range os.Environ() {
		name, value, _ := strings.Cut(variable, "=")
		upper := strings.ToUpper(name)
		if value != "" && strings.HasPrefix(upper, envPrefix+"_") && !slices.Contains(names, upper) {
			fmt.Fprintf(a.err, "stillair: warning: the environment variable %s is no setting and has no effect. %s\n", printable(name), didYouMean(upper, names))
		}
	}
}

// settingsFile finds and reads the settings file. Only one that was asked for
// has to exist.
func (a *app) settingsFile() (path string, text []byte, err error) {
	path = a.file
	if path == "" {
		path = defaultSettingsPath()
	}
	if path == "" {
		return "", nil, nil
	}
	text, err = os.ReadFile(path)
	switch {
	case err == nil:
		return path, text, nil
	case a.file == "" && errors.Is(err, fs.ErrNotExist):
		return path, nil, nil
	case errors.Is(err, fs.ErrNotExist):
		return path, nil, inputError("", "There is no settings file %s.", path)
	}
	return path, nil, ioError("Reading the settings file failed", err)
}

// defaultSettingsPath is where the settings file is looked for; "" when the
// system names no configuration folder.
func defaultSettingsPath() string {
	folder, err := os.UserConfigDir()
	if err != nil {
		return ""
	}
	return filepath.Join(folder, "stillair", "settings.yaml")
}

func layered(text []byte, flags *pflag.FlagSet) (*viper.Viper, error) {
	v := viper.New()
	v.SetConfigType("yaml")
	v.SetEnvPrefix(envPrefix)
	for _, s := range allSettings {
		v.SetDefault(s.key, s.def)
		if err := v.BindEnv(s.key); err != nil {
			return nil, err
		}
		if f := flags.Lookup(s.key); f != nil {
			if err := v.BindPFlag(s.key, f); err != nil {
				return nil, err
			}
		}
	}
	return v, v.ReadConfig(bytes.NewReader(text))
}

// origin says which layer a value comes from.
func origin(v *viper.Viper, s setting, flags *pflag.FlagSet, path string) string {
	if f := flags.Lookup(s.key); f != nil && f.Changed {
		return "flag --" + s.key
	}
	if os.Getenv(s.env()) != "" {
		return "environment " + s.env()
	}
	if v.InConfig(s.key) {
		return "file " + path
	}
	return "default"
}

// check looks at every value and reads the logo.
func (s *settings) check(path string, v *viper.Viper) error {
	for _, x := range allSettings {
		if message, help := x.wrong(v.GetString(x.key)); message != "" {
			if strings.HasPrefix(s.from[x.key], "flag ") {
				return usageError(help, "Flag --%s: %s", x.key, message)
			}
			return inputError(help, "Setting %s, from %s: %s", x.key, s.from[x.key], message)
		}
	}
	s.Units, s.Paper = settingOf("units").spelling(s.Units), settingOf("paper").spelling(s.Paper)
	if s.Logo == "" {
		return nil
	}
	if strings.HasPrefix(s.from["logo"], "file ") && !filepath.IsAbs(s.Logo) {
		s.Logo = filepath.Join(filepath.Dir(path), s.Logo)
	}
	return s.readLogo()
}

// wrong tells what is wrong with a value; both texts are empty when it is
// right.
func (x setting) wrong(value string) (message, help string) {
	if value == "" {
		return "", ""
	}
	if len(x.values) > 0 && x.spelling(value) == "" {
		return fmt.Sprintf("%q is not one of %s.", value, strings.Join(x.values, ", ")), didYouMean(value, x.values)
	}
	if x.isQuantity {
		if _, err := unit.Parse(value, x.quantity); err != nil {
			return fmt.Sprintf("%q is not %s: %v.", value, x.quantity.Name(), err), "For example: " + x.quantity.Example()
		}
	}
	return "", ""
}

// spelling is the allowed word that a value means, whatever its capitals.
func (x setting) spelling(value string) string {
	for _, w := range x.values {
		if strings.EqualFold(w, value) {
			return w
		}
	}
	return ""
}

// maxLogo bounds the picture: a logo of more bytes or pixels is a mistake.
const (
	maxLogoBytes  = 2 << 20
	maxLogoPixels = 4000
)

func (s *settings) readLogo() error {
	where := s.from["logo"]
	data, err := os.ReadFile(s.Logo)
	if err != nil {
		return inputError("", "Setting logo, from %s: the picture cannot be read: %v.", where, err)
	}
	c, err := png.DecodeConfig(bytes.NewReader(data))
	if err != nil {
		return inputError("", "Setting logo, from %s: %s is not a PNG picture: %v.", where, s.Logo, err)
	}
	if len(data) > maxLogoBytes || c.Width > maxLogoPixels || c.Height > maxLogoPixels {
		return inputError("", "Setting logo, from %s: %s is larger than 2 MB or %d pixels.", where, s.Logo, maxLogoPixels)
	}
	if _, err := png.Decode(bytes.NewReader(data)); err != nil {
		return inputError("", "Setting logo, from %s: %s is a damaged PNG picture: %v.", where, s.Logo, err)
	}
	s.logo = data
	return nil
}

// defaults is what the case file reader takes from the settings.
func (s *settings) defaults() casefile.Defaults {
	return casefile.Defaults{Units: s.Units, Owner: s.Company, Air: s.Air, Radiant: s.Radiant, Altitude: s.Altitude}
}

// count is a number with its noun: "1 error", "3 errors".
func count(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return fmt.Sprintf("%d %ss", n, noun)
}
