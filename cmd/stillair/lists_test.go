package main

import (
	"runtime/debug"
	"strings"
	"testing"
	"unicode/utf8"

	"stillair/templates/starter"
)

// On a terminal no line of a catalogue is wider than it; elsewhere each entry
// has one line whatever its length.
func TestListingsFitTheTerminal(t *testing.T) {
	const wide = 100
	lists := map[string]*listing{"limits": limitList(), "methods": methodList(), "materials": materialList(), "finishes": finishList()}
	for name, l := range lists {
		whole := strings.Split(string(l.lines(l.rows, 0)), "\n")
		if len(whole) < len(l.rows)+1 || !strings.HasPrefix(whole[len(l.rows)], l.rows[len(l.rows)-1].id) {
			t.Errorf("%s off a terminal: an entry is not one line", name)
		}
		if name != "limits" {
			continue // the columns of the others hold short words
		}
		text := string(l.lines(l.rows, wide))
		for _, line := range strings.Split(text, "\n") {
			if utf8.RuneCountInString(line) > wide || strings.HasSuffix(line, " ") {
				t.Errorf("%s: line %q", name, line)
			}
		}
		if got, want := strings.Join(strings.Fields(text), ""), l.rows[0].id; !strings.Contains(got, want) {
			t.Errorf("%s: %s is lost", name, want)
		}
	}
}

func TestWrappedCellsKeepTheirWordsAndColumns(t *testing.T) {
	l := &listing{heads: []string{"id", "says", "confidence"}}
	l.rows = []listRow{{cells: []string{"a", "one two three four five six seven eight nine ten", "high"}}}
	want := "id  says                      confidence\n" +
		"a   one two three four five   high\n" +
		"    six seven eight nine ten\n"
	if got := string(l.lines(l.rows, 41)); got != want {
		t.Errorf("got\n%swant\n%s", got, want)
	}
}

func TestLongTimesAreReadable(t *testing.T) {
	for in, want := range map[string]string{
		"contact 28800 s (x)": "contact 8 h (x)", "contact 600 s": "contact 10 min", "contact 60\u00a0s,": "contact 1\u00a0min,",
		"contact 5 s": "contact 5 s", "90 s": "90 s", "7200 s": "2 h", "0.5 s": "0.5 s", "600 sheets": "600 sheets",
	} {
		if got := readableTimes(in); got != want {
			t.Errorf("%q becomes %q, want %q", in, got, want)
		}
	}
	for _, r := range limitList().rows {
		if strings.Contains(r.cells[2], "28800") {
			t.Errorf("%s: %s", r.id, r.cells[2])
		}
	}
}

// Open ends of ranges are open, and powers of ten are written as such.
func TestRangesOfMethods(t *testing.T) {
	want := map[string]string{"raithby-hollands-1975-up": "from 1", "goldstein-lloyd-moran-up": "1 to 1·10¹¹", "churchill-1983-sphere": "up to 1·10¹¹"}
	for _, r := range methodList().rows {
		if ra, ok := want[r.id]; ok && r.cells[2] != ra {
			t.Errorf("%s: %q, want %q", r.id, r.cells[2], ra)
		}
		if strings.Contains(r.cells[2], "..") || strings.Contains(r.cells[2], "e+") {
			t.Errorf("%s: %q", r.id, r.cells[2])
		}
	}
}

func TestStarterListIsAligned(t *testing.T) {
	at := -1
	for i, line := range strings.Split(strings.TrimRight(kindList(), "\n"), "\n") {
		k := starter.Kinds()[i]
		column := strings.Index(line, k.About)
		if at < 0 {
			at = column
		}
		if column != at || !strings.HasPrefix(line, "  "+k.Name+"  ") {
			t.Errorf("line %q", line)
		}
	}
}

func TestVersionFrom(t *testing.T) {
	setting := func(pairs ...string) (list []debug.BuildSetting) {
		for i := 0; i < len(pairs); i += 2 {
			list = append(list, debug.BuildSetting{Key: pairs[i], Value: pairs[i+1]})
		}
		return list
	}
	const revision = "0123456789abcdef0123456789abcdef01234567"
	for _, c := range []struct {
		main     string
		settings []debug.BuildSetting
		want     string
	}{
		{"(devel)", nil, "0.1.0"},
		{"", nil, "0.1.0"},
		{"v0.2.0", nil, "v0.2.0"},
		{"v0.0.0-20261201-0123456789ab+dirty", setting("vcs.revision", revision, "vcs.modified", "true"), "0.1.0+0123456789ab,modified"},
		{"(devel)", setting("vcs.revision", revision, "vcs.modified", "false"), "0.1.0+0123456789ab"},
		{"", setting("vcs.revision", "42"), "0.1.0+42"},
	} {
		info := &debug.BuildInfo{Settings: c.settings}
		info.Main.Version = c.main
		if got := versionFrom(info); got != c.want {
			t.Errorf("%q %v: %s, want %s", c.main, c.settings, got, c.want)
		}
	}
}
