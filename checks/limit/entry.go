// Package limit holds what temperatures are judged against: burn thresholds and
// equipment limits as quoted from standards, the rule that decides with
// uncertainty, the dew point, and the cautions that belong beside a verdict.
//
// Every row of the table is a quotation. No standard was read in full, and the
// table has no normative force: read the edition that applies.
package limit

import (
	_ "embed" // the limit table
	"fmt"
	"slices"
	"strings"
	"sync"

	"stillair/radiation/catalogue"
)

//go:embed limits.csv
var limitTable string

// Celsius0 is 0 °C in kelvin.
const Celsius0 = 273.15

// The kinds of entry that a temperature can be judged against.
const (
	kindLimit     = "limit_abs"     // highest temperature
	kindRise      = "limit_rise"    // highest rise above the ambient air
	kindThreshold = "threshold_abs" // burn threshold
)

// Entry is one row of the limit table.
type Entry struct {
	ID       string
	Group    string // family of the row: "burn_threshold", "plant_practice" ...
	Standard string // with its edition where the quotation gives one
	Clause   string
	Item     string // what the row is about
	Material string // surface material, may be empty
	Coating  string
	Time     string // contact time in seconds: "10", "10-60", "60+"; may be empty

	// Kind says what Low and High are: limit_abs, limit_rise, threshold_abs,
	// threshold_increment, ambient, contact_time, property, constant, rule,
	// equation or definition.
	Kind      string
	Low, High float64 // in Unit; of a band, its edges
	HasLow    bool
	HasHigh   bool
	Unit      string // "°C", "K", "s" ...

	Conditions string
	Source     string // where the quotation was found
	VerifiedBy string // how it was verified, "memory" when not seen in print
	Confidence string // "high", "medium", "low"
	Notes      string
}

// All lists the table in its order.
func All() []Entry { return slices.Clone(entries()) }

// Find looks an entry up by its id, whatever the case.
func Find(id string) (Entry, bool) {
	for _, e := range entries() {
		if strings.EqualFold(e.ID, strings.TrimSpace(id)) {
			return e, true
		}
	}
	return Entry{}, false
}

// Rule is the entry that a case file names as a limit, an error when there is
// none of that id or when no temperature can be judged against it.
func Rule(id string) (Entry, error) {
	e, ok := Find(id)
	if !ok {
		return Entry{}, fmt.Errorf("there is no limit %q in the limit table", id)
	}
	if !e.Usable() {
		return Entry{}, fmt.Errorf("entry %s (%s) is no limit that the temperature of a surface or of air can be judged against", e.ID, e.Item)
	}
	return e, nil
}

// Usable reports whether the temperature of a surface or of air can be judged
// against the entry: a highest temperature, a highest rise or a burn threshold
// with a value. Thresholds of the skin itself are not usable, since the skin is
// cooler than the surface it touches.
func (e Entry) Usable() bool {
	if !e.HasLow || strings.HasPrefix(e.Material, "skin") || e.ID == basalThreshold {
		return false
	}
	switch e.Kind {
	case kindLimit, kindThreshold:
		return e.Unit == "°C"
	case kindRise:
		return e.Unit == "K"
	}
	return false
}

// basalThreshold is the threshold of the basal layer inside the skin; its row
// names no surface material.
const basalThreshold = "HM-basal"

// IsTouch reports whether the entry is about a person touching a surface: burn
// thresholds, personnel protection and the touch limits of product standards.
func (e Entry) IsTouch() bool {
	switch e.Group {
	case "burn_threshold", "burn_model", "ASTM_C1055", "ASTM_C1057", "plant_practice", "IEC_62368-1", "IEC_61010-1", "IEC_62115 (children)", "IEC_60950-1 (superseded)":
		return true
	}
	return strings.Contains(e.Item, "enclosures and covers") || strings.Contains(e.Item, "manual operating means")
}

// IsRise reports whether the entry limits the rise above the ambient air.
func (e Entry) IsRise() bool { return e.Kind == kindRise }

// Kelvin is the highest temperature in kelvin that a usable entry allows, given
// the ambient air in kelvin (which only a rise needs). Of a band it is the lower
// edge. An entry that is not usable gives 0 and false.
func (e Entry) Kelvin(ambient float64) (K float64, ok bool) {
	switch {
	case !e.Usable():
		return 0, false
	case e.IsRise():
		return ambient + e.Low, true
	}
	return e.Low + Celsius0, true
}

// Text says the entry in words: "at most 60 °C, personnel protection limit,
// metal, contact 5 s (industry practice from ASTM C1055)".
func (e Entry) Text() string {
	var parts []string
	for _, part := range []string{e.valueText(), e.Item, strings.ReplaceAll(e.Material, "_", " "), e.Coating, e.timeText()} {
		if part != "" {
			parts = append(parts, part)
		}
	}
	from := e.Standard
	if e.Clause != "" {
		from += ", " + e.Clause
	}
	return fmt.Sprintf("%s (%s)", strings.Join(parts, ", "), from)
}

// space is the no-break space between a number and its unit.
const space = "\u00a0"

// valueText is the value with the word that its kind asks for.
func (e Entry) valueText() string {
	if !e.HasLow {
		return ""
	}
	value := fmt.Sprintf("%g", e.Low)
	unit := ""
	if e.Unit != "-" {
		unit = space + e.Unit
	}
	band := ""
	if e.HasHigh && e.High != e.Low {
		band = fmt.Sprintf("%g to %g%s", e.Low, e.High, unit)
	}
	switch {
	case e.Kind == kindLimit && band != "":
		return "at most " + value + unit + " (range " + band + ")"
	case e.Kind == kindLimit:
		return "at most " + value + unit
	case e.Kind == kindRise:
		return "rise of at most " + value + unit + " above ambient"
	case band != "" && e.Kind == kindThreshold:
		return value + unit + ", lower edge of the band " + band
	case band != "":
		return band
	}
	return value + unit
}

func (e Entry) timeText() string {
	t := e.Time
	switch {
	case t == "":
		return ""
	case strings.HasSuffix(t, "+"):
		return "contact " + strings.TrimSuffix(t, "+") + space + "s or longer"
	case strings.HasPrefix(t, "<"):
		return "contact below " + strings.TrimPrefix(t, "<") + space + "s"
	}
	return "contact " + strings.ReplaceAll(t, "-", " to ") + space + "s"
}

// DataVersion identifies the limit table built into the program.
func DataVersion() string { return catalogue.Version(limitTable) }

// entries is the parsed table. The table is part of the program, so one that
// does not parse is a fault of the program, not of any input.
var entries = sync.OnceValue(func() []Entry {
	list, err := readEntries(limitTable)
	if err != nil {
		panic(err)
	}
	return list
})

func readEntries(table string) ([]Entry, error) {
	rows, err := catalogue.Read(table)
	if err != nil {
		return nil, err
	}
	list := make([]Entry, 0, len(rows))
	for _, r := range rows {
		e := Entry{
			ID: r.Text("id"), Group: r.Text("group"), Standard: r.Text("standard"),
			Clause: r.Text("clause"), Item: r.Text("item"), Material: r.Text("material"),
			Coating: r.Text("coating"), Time: r.Text("contact_time_s"), Kind: r.Text("kind"),
			Unit: r.Text("unit"), Conditions: r.Text("conditions"), Source: r.Text("source"),
			VerifiedBy: r.Text("verified_by"), Confidence: r.Text("confidence"), Notes: r.Text("notes"),
		}
		if e.Low, e.HasLow, err = r.Number("low"); err != nil {
			return nil, err
		}
		if e.High, e.HasHigh, err = r.Number("high"); err != nil {
			return nil, err
		}
		list = append(list, e)
	}
	return list, nil
}
