package casefile

import (
	"slices"

	"stillair/checks/limit"
	"stillair/checks/material"
	"stillair/checks/unit"
	"stillair/freeconv"
	"stillair/radiation"
)

// form is what may stand behind a key.
type form int

const (
	text     form = iota // any words
	word                 // one word of a list
	quantity             // a number with its unit
	section              // keys that are described one by one
	byName               // keys from a list of names, all described alike
	list                 // a list of entries that are described alike
)

// span is the range a quantity may have, in SI units. An open end excludes
// its bound; text says the range in words.
type span struct {
	low, high float64
	openLow   bool
	text      string
}

func (s *span) holds(x float64) bool {
	return s == nil || x <= s.high && (x > s.low || x == s.low && !s.openLow)
}

// vocabulary is a list of words that a value is chosen from.
type vocabulary struct {
	code  string                 // of the finding for a wrong word
	noun  string                 // "finish"
	words func() []string        // what can be typed
	known func(word string) bool // nil: one of words, letter for letter
}

func (v *vocabulary) knows(w string) bool {
	if v.known != nil {
		return v.known(w)
	}
	return slices.Contains(v.words(), w)
}

func fixed(noun string, words ...string) *vocabulary {
	return &vocabulary{code: "E-304", noun: noun, words: func() []string { return words }}
}

// input describes one input once. The reader, the schema, the documentation
// and the error texts all draw from it.
type input struct {
	key      string
	label    string // name in the input table of the note; empty keeps it out
	help     string // one sentence
	form     form
	kind     unit.Kind // of a quantity
	span     *span
	required bool
	usual    string // the default as it would be typed
	why      string // where the default comes from
	words    *vocabulary
	example  string
	names    []string // keys of a byName
	parts    []*input // of a section
	each     *input   // of a byName or a list
}

func (in *input) part(key string) *input {
	for _, p := range in.parts {
		if p.key == key {
			return p
		}
	}
	return nil
}

// child describes what stands behind a key.
func (in *input) child(key string) *input {
	if in.form == byName && slices.Contains(in.names, key) {
		return in.each
	}
	return in.part(key)
}

// keys lists what may stand in a section.
func (in *input) keys() []string {
	if in.form == byName {
		return in.names
	}
	var keys []string
	for _, p := range in.parts {
		keys = append(keys, p.key)
	}
	return keys
}

// Ranges. Bounds that are not physical (a body of 1000 m) only catch slips.
var (
	anyTemperature = &span{0, 3000, true, "above absolute zero and at most 3000 K"}
	size           = &span{0, 1000, true, "more than 0 and at most 1000 m"}
	thickness      = &span{0, 10, true, "more than 0 and at most 10 m"}
	conductivity   = &span{0, 5000, true, "more than 0 and at most 5000 W/(m·K)"}
	fraction       = &span{0, 1, false, "0 to 1"}
	share          = &span{0, 1, false, "0 % to 100 %"}
	mostOf         = &span{0, 0.9, false, "0 % to 90 %"}
	half           = &span{0, 0.5, false, "0 to 0.5"}
	half100        = &span{0, 0.5, false, "0 % to 50 %"}
	wet            = &span{0, 1, true, "more than 0 % and at most 100 %"}
	difference     = &span{0, 1000, false, "0 K to 1000 K"}
	someDifference = &span{0, 1000, true, "more than 0 K and at most 1000 K"}
	irradiance     = &span{0, 2000, false, "0 W/m² to 2000 W/m²"}
	power          = &span{-1e9, 1e9, false, "-1 GW to 1 GW (negative cools)"}
	quarterTurn    = &span{-1.5707963268, 1.5707963268, false, "-90 deg to 90 deg"}
	heights        = &span{-500, 11000, false, "-500 m to 11 000 m, the troposphere"}
	pressures      = &span{1000, 1e6, false, "1 kPa to 1 MPa"}
	factors        = &span{1, 3, false, "1 to 3"}
	contactTimes   = &span{limit.ShortestContact, 1e6, false, "0.5 s, where burn thresholds begin, to 1 000 000 s"}
)

// Vocabularies from the catalogues.
var (
	finishes = &vocabulary{"E-306", "finish", func() (names []string) {
		for _, f := range radiation.Finishes() {
			names = append(names, f.Name)
		}
		return names
	}, func(w string) bool { _, ok := radiation.FindFinish(w); return ok }}

	materials = &vocabulary{"E-307", "material", func() (names []string) {
		for _, m := range material.All() {
			names = append(names, m.Name)
		}
		return names
	}, func(w string) bool { _, ok := material.Find(w); return ok }}

	touchMaterials = &vocabulary{"E-308", "surface material", limit.TouchMaterials,
		func(w string) bool { _, err := limit.Touch(w, 60); return err == nil }}

	rules = &vocabulary{"E-309", "limit", func() (ids []string) {
		for _, e := range limit.All() {
			if e.Usable() {
				ids = append(ids, e.ID)
			}
		}
		return ids
	}, func(w string) bool { _, err := limit.Rule(w); return err == nil }}
)

// methodsOf lists the correlations for a situation.
func methodsOf(situation string) (ids []string) {
	for _, c := range freeconv.For(freeconv.Kind(situation)) {
		ids = append(ids, c.ID)
	}
	return ids
}

// situations are the keys of the section methods.
func situations() (names []string) {
	for _, k := range freeconv.Kinds() {
		if k != freeconv.AnyShape {
			names = append(names, string(k))
		}
	}
	return names
}

// optional makes a description for a load case, where nothing is required.
func (in input) optional() *input {
	in.required = false
	for i, p := range in.parts {
		if i == 0 {
			in.parts = slices.Clone(in.parts)
		}
		in.parts[i] = p.optional()
	}
	if in.each != nil && in.form == byName {
		in.each = in.each.optional()
	}
	return &in
}

// description is the tree of the whole case file.
var description = &input{form: section, help: "A case of stillair: a body in still air, its surroundings, its limits.", parts: []*input{
	{key: "title", help: "What the case is about; heads the report and the note.", required: true, example: "Rectifier panel, pump house"},
	{key: "tag", help: "Equipment or line number.", example: "RP-104"},
	note,
	{key: "units", help: "Units that results are shown in; any unit can be typed anywhere.", form: word, words: fixed("system of units", "SI", "US"), usual: "SI", why: "SI unless a setting says otherwise", example: "SI"},
	{key: "remarks", help: "Remarks for the reader of the note.", form: list, each: &input{help: "One remark.", example: "Sizes from drawing 7."}},
	surroundings,
	body,
	heat,
	contents,
	inside,
	methods,
	{key: "limits", help: "What the temperatures are judged against. The list holds for every load case; for: in a load case says which of them it is judged by.", form: list, each: limitEntry},
	{key: "loads", help: "Load cases: each has a name and the inputs it changes. Sections are merged key by key; a list typed in a load case replaces the whole list of the case. Left out, the case is judged as described.", form: list, each: loadEntry},
	uncertainty,
}}

var note = &input{key: "note", help: "The title block of the calculation note (fields after ISO 7200) and its purpose.", form: section, parts: []*input{
	{key: "number", help: "Identification number of the note.", example: "TN-0042"},
	{key: "revision", help: "Revision of the note.", example: "A"},
	{key: "project", help: "Project the note belongs to.", example: "Riverside pump house"},
	{key: "client", help: "Client of the project.", example: "Riverside Water"},
	{key: "owner", help: "Legal owner of the note, usually the company.", why: "setting", example: "Example Engineering"},
	{key: "status", help: "Status of the note.", example: "draft"},
	{key: "prepared", help: "Who prepared the note.", example: "A. Preparer"},
	{key: "checked", help: "Who checked the note.", example: "B. Checker"},
	{key: "approved", help: "Who approved the note.", example: "C. Approver"},
	{key: "date", help: "Date of issue.", example: "2026-11-30"},
	{key: "reason", help: "Reason for this revision.", example: "first issue"},
	{key: "purpose", help: "What the note is to show.", example: "Show that the drive stays below its rating in summer."},
}}

var air = &input{key: "air", label: "air temperature", help: "Temperature of the air away from the body, in the shade.",
	form: quantity, kind: unit.Temperature, span: anyTemperature, required: true, example: "40 °C"}

var radiant = &input{key: "radiant", label: "radiant temperature of the surroundings", help: "Temperature of what the faces see; the air temperature when left out.",
	form: quantity, kind: unit.Temperature, span: anyTemperature, example: "40 °C"}

var sees = &input{key: "sees", help: "Radiant temperature that single faces see, such as a night sky above the top.", form: byName, names: allFaces,
	each: &input{label: "radiant temperature seen by", help: "Radiant temperature that this face sees.", form: quantity, kind: unit.Temperature, span: anyTemperature, example: "-35 °C"}}

var sun = &input{key: "sun", help: "Sun that reaches single faces, per area of the face.", form: byName, names: allFaces,
	each: &input{label: "sun on", help: "Irradiance on this face.", form: quantity, kind: unit.Flux, span: irradiance, example: "700 W/m²"}}

var altitude = &input{key: "altitude", label: "altitude", help: "Height above sea level, which gives the air pressure.",
	form: quantity, kind: unit.Altitude, span: heights, usual: "0 m", why: "sea level", example: "120 m"}

var pressure = &input{key: "pressure", label: "air pressure", help: "Absolute air pressure, instead of altitude.",
	form: quantity, kind: unit.Pressure, span: pressures, example: "100 kPa"}

var humidity = &input{key: "humidity", label: "relative humidity", help: "Relative humidity of the air, for condensation.",
	form: quantity, kind: unit.Percent, span: wet, example: "85 %"}

var surroundings = &input{key: "surroundings", help: "The air and what the body sees.", form: section, required: true,
	parts: []*input{air, radiant, sees, sun, altitude, pressure, humidity}}

var heat = &input{key: "heat", label: "heat to shed", help: "Heat that the body turns out and must shed; negative when it is cooled; leave out when contents is given.",
	form: quantity, kind: unit.Power, span: power, example: "250 W"}

var contents = &input{key: "contents", label: "temperature of the contents", help: "Temperature that the contents hold, instead of heat.",
	form: quantity, kind: unit.Temperature, span: anyTemperature, example: "184 °C"}

var inside = &input{key: "inside", help: "The inside of a box.", form: section, parts: []*input{
	{key: "emissivity", label: "effective emissivity inside", help: "Effective emissivity between the equipment, taken at the inside air temperature, and the walls.",
		form: quantity, kind: unit.Ratio, span: fraction, usual: "0.7", why: "stated assumption: effective emissivity between equipment at inside-air temperature and walls", example: "0.7"},
	{key: "upper zone", label: "upper zone factor", help: "How many times the mean rise of the inside air its upper zone has.",
		form: quantity, kind: unit.Ratio, span: factors, usual: "1.3", why: "assumed factor, no published source", example: "1.3"},
}}

var methods = methodsInput()

// methodsInput has one key for each situation, so that each offers the
// correlations published for it.
func methodsInput() *input {
	in := &input{key: "methods", help: "Correlations to use instead of the defaults, by situation.", form: section}
	for _, s := range situations() {
		in.parts = append(in.parts, &input{key: s, label: "method for " + s, form: word,
			help:    "Correlation for the situation " + s + ".",
			words:   &vocabulary{code: "E-311", noun: "method for " + s, words: func() []string { return methodsOf(s) }},
			example: methodsOf(s)[0]})
	}
	return in
}

var limitEntry = &input{help: "One limit: where, how much, and who says so.", form: section, parts: []*input{
	{key: "at", help: "Where it holds: inside air, upper zone, contents, any face, or the name of a face.", form: word,
		words: fixed("place", append([]string{"inside air", "upper zone", "contents", "any face"}, allFaces...)...), required: true, example: "any face"},
	{key: "most", help: "Highest temperature allowed.", form: quantity, kind: unit.Temperature, span: anyTemperature, example: "55 °C"},
	{key: "least", help: "Lowest temperature allowed.", form: quantity, kind: unit.Temperature, span: anyTemperature, example: "-5 °C"},
	{key: "rise", help: "Highest rise over the air temperature.", form: quantity, kind: unit.TemperatureDifference, span: someDifference, example: "30 K"},
	{key: "touch", help: "Surface material for a burn threshold.", form: word, words: touchMaterials, example: "coated metal"},
	{key: "contact", help: "Contact time for a burn threshold.", form: quantity, kind: unit.Time, span: contactTimes, example: "10 s"},
	{key: "rule", help: "Id of a limit in the limit table, which carries its own source.", form: word, words: rules, example: "C1055-60C"},
	{key: "condensation", help: "No condensation: the surface stays above the dew point.", form: word, words: fixed("condensation limit", "none"), example: "none"},
	{key: "why", help: "Reason for a project limit, such as the data sheet it is on.", example: "drive rating, sheet 4"},
	{key: "source", help: "Standard with edition that the limit comes from.", example: "IEC 61439-1:2020"},
}}

var loadEntry = &input{help: "One load case.", form: section, parts: []*input{
	{key: "name", help: "Name of the load case.", required: true, example: "summer sun"},
	{key: "for", help: "What the load case is for. touch: judges touch limits and limits on faces. component: judges every limit but those of touch and condensation. condensation: judges least and no-condensation limits. loss: nothing is judged, the heat is reported. Left out, every limit is judged.", form: word, words: fixed("purpose", "touch", "component", "loss", "condensation"), example: "touch"},
	air.optional(), radiant, sees, sun, altitude, pressure, humidity, heat, contents,
	body.optional(), inside, methods, uncertainty,
}}

var uncertainty = &input{key: "uncertainty", help: "Shifts for the uncertainty of the result, about two standard deviations each.", form: section, parts: []*input{
	{key: "heat", label: "uncertainty of the heat", help: "Of the heat, relative.", form: quantity, kind: unit.Percent, span: share, usual: "10 %", why: "stated assumption", example: "10 %"},
	{key: "air", label: "uncertainty of the air temperature", help: "Of air and radiant temperature together.", form: quantity, kind: unit.TemperatureDifference, span: difference, usual: "2 K", why: "stated assumption", example: "2 K"},
	{key: "contents", label: "uncertainty of the contents temperature", help: "Of the temperature of the contents.", form: quantity, kind: unit.TemperatureDifference, span: difference, usual: "2 K", why: "stated assumption", example: "2 K"},
	{key: "sun", label: "uncertainty of the sun", help: "Of the irradiance, relative.", form: quantity, kind: unit.Percent, span: share, usual: "10 %", why: "stated assumption", example: "10 %"},
	{key: "humidity", label: "uncertainty of the humidity", help: "Of the relative humidity, in percent points.", form: quantity, kind: unit.Percent, span: half100, usual: "5 %", why: "stated assumption", example: "5 %"},
	{key: "correlation", label: "uncertainty of the film coefficient", help: "Of the film coefficient where its source publishes no scatter, relative.", form: quantity, kind: unit.Percent, span: mostOf, usual: "20 %", why: "stated assumption where the correlation has no published scatter", example: "20 %"},
	{key: "emissivity", label: "uncertainty of the emissivity", help: "Of the outside emissivity, absolute; left out, the range of the finish, or 0.05 around a typed emissivity.", form: quantity, kind: unit.Ratio, span: half, example: "0.05"},
	{key: "absorptance", label: "uncertainty of the solar absorptance", help: "Of the solar absorptance, absolute; left out, the range of the finish, or 0.10 around a typed absorptance.", form: quantity, kind: unit.Ratio, span: half, example: "0.10"},
	{key: "inside", label: "uncertainty of the emissivity inside", help: "Of the effective emissivity inside, absolute.", form: quantity, kind: unit.Ratio, span: half, usual: "0.2", why: "stated assumption", example: "0.2"},
	{key: "upper zone", label: "uncertainty of the upper zone factor", help: "Of the factor for the upper zone, absolute.", form: quantity, kind: unit.Ratio, span: half, usual: "0.2", why: "stated assumption", example: "0.2"},
	{key: "conductivity", label: "uncertainty of the conductivity", help: "Of the conductivity of walls and layers, relative.", form: quantity, kind: unit.Percent, span: mostOf, usual: "16 %", why: "twice the between-laboratory standard deviation of 8.0 % of the ASTM C16.30 / NBS round robin", example: "16 %"},
	{key: "thickness", label: "uncertainty of the thickness", help: "Of the thickness of walls and layers, relative.", form: quantity, kind: unit.Percent, span: mostOf, usual: "5 %", why: "stated assumption", example: "5 %"},
}}
