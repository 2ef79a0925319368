// Package casefile reads the case file: strict YAML with typed quantities.
// Every problem of a file is found at once and told with its place, what was
// found, what was expected and the nearest right word. A file that reads
// without a finding of severity Error becomes one Case per load case.
package casefile

// Quantity is a value with the words it came from.
type Quantity struct {
	SI    float64 // value in SI units (kelvin for temperatures, fraction for percentages)
	Typed string  // as written in the file, or as the default is written
	// Source says where the value comes from when it was not typed in the
	// case: "default", "setting", "finish library" ...; empty when typed.
	Source string
	Line   int // 1-based; 0 when not typed
	Set    bool
}

// Case is everything one load case needs, in SI units. It is a plain value:
// copying it and changing a number gives another case.
type Case struct {
	Title, Tag string
	Note       Note
	Units      string // "SI" or "US": how results are shown
	Remarks    []string

	Load         Load // the load case this is; Load.Name is "as described" when the file has no loads
	Surroundings Surroundings
	Body         Body

	Heat     Quantity // W; Set when the body is driven by heat
	Contents Quantity // K; Set when the body is held at its contents' temperature
	Inside   Inside   // boxes only

	Methods     map[string]string // correlation id by situation name (freeconv.Kind)
	Limits      []Limit
	Uncertainty Uncertainty
}

// Note is the document side of the case: ISO 7200 title block fields and what
// the front page says. Empty strings are shown as marked empty boxes.
type Note struct {
	Number, Revision, Project, Client, Status string
	Prepared, Checked, Approved               string
	Date, Reason, Purpose                     string
	Owner                                     string // legal owner; from settings when left out
}

// Load is the head of a load case.
type Load struct {
	Name    string
	Purpose string // "touch", "component", "loss", "condensation" or "" (every limit is judged)
	// Changed lists what this load changes against the case as described.
	Changed []Input
}

// Surroundings of the body.
type Surroundings struct {
	Air      Quantity            // K
	Radiant  Quantity            // K; equals Air when left out (Source "air temperature")
	Sees     map[string]Quantity // K, radiant temperature of one face, by face name
	Sun      map[string]Quantity // W/m², irradiance on a face
	Altitude Quantity            // m
	Pressure Quantity            // Pa; Set only when typed: it then wins over Altitude
	Humidity Quantity            // fraction 0..1; Set when typed
}

// Body is one body. Kind says which fields count.
type Body struct {
	Kind string // "plate", "cylinder", "pipe", "sphere", "box", "vessel"

	Width, Height, Depth Quantity // m; plate: Width, Height; box: all three (outside)
	Diameter, Length     Quantity // m; Diameter is the outside of the bare body
	Tilt                 Quantity // rad; plate: from the vertical, positive when the front turns up
	Axis                 string   // "horizontal" or "vertical": cylinder, pipe, vessel
	Heads                string   // "flat" or "dished": vessel

	// Covered names the faces that shed no heat, with the reason typed:
	// "covered", "wall", "floor", "neighbour".
	Covered map[string]string

	Wall       *Layer  // nil: not modelled, the surface is at the temperature inside
	Layers     []Layer // from the wall outwards
	Finish     string  // catalogue name; empty when the emissivity is typed
	Emissivity Range   // outside
	Absorb     Range   // solar absorptance; Set false when unknown
}

// Layer is one sheet of solid.
type Layer struct {
	Material     string   // catalogue name; empty when the conductivity is typed
	Thickness    Quantity // m
	Conductivity Quantity // W/(m·K); Set only when typed
}

// Range is a value with its lowest and highest plausible one.
type Range struct {
	Low, Typical, High float64
	Typed              string
	Source             string
	Confidence         string // "high", "medium", "low", or "" when typed in the case
	Line               int
	Set                bool
}

// Inside is the inside of a box.
type Inside struct {
	// Emissivity is the effective emissivity between the equipment, taken at
	// the inside air temperature, and the walls.
	Emissivity Quantity
	// UpperZone multiplies the mean rise of the inside air for the upper zone.
	UpperZone Quantity
}

// Limit as written in the case. Exactly one of Most, Least, Rise, Touch, Rule
// and NoCondensation is used.
type Limit struct {
	At             string   // "inside air", "upper zone", "any face", a face name, "surface"
	Most           Quantity // K
	Least          Quantity // K
	Rise           Quantity // K difference over the air
	Touch          string   // surface material of the touch limit, e.g. "coated metal"
	Contact        Quantity // s
	Rule           string   // id of a limit in the catalogue
	NoCondensation bool
	Why            string // reason of a project limit
	Source         string // standard with edition, when the limit comes from one
	Line           int
}

// Uncertainty holds the shifts for the root-sum-square, about two standard
// deviations each.
type Uncertainty struct {
	Heat         Quantity // fraction of the heat
	Air          Quantity // K difference, air and radiant together
	Contents     Quantity // K difference
	Sun          Quantity // fraction
	Humidity     Quantity // fraction, of the relative humidity, absolute
	Correlation  Quantity // fraction of h where no scatter is published
	Emissivity   Quantity // absolute; Set only when typed, otherwise the finish range is used
	Absorptance  Quantity // absolute; Set only when typed, otherwise the finish range or 0.10 around a typed one
	Inside       Quantity // absolute, of Inside.Emissivity
	UpperZone    Quantity // absolute, of Inside.UpperZone
	Conductivity Quantity // fraction
	Thickness    Quantity // fraction
}

// Input is one line of the note's input table.
type Input struct {
	Path   string // "body.box.width"
	Label  string // "width of the box"
	Typed  string // "600 mm"
	SI     string // "0.600 m"
	Source string // "case file line 12", "default: ...", "setting", "finish library: ..."
	// Assumption marks a value nobody typed.
	Assumption bool
}
