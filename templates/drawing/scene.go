// Package drawing makes the pictures of a note as plain lists of lines, areas
// and words in millimetres, so that one drawing serves the PDF, SVG and tests.
package drawing

// Color is an sRGB colour, 0..255 a channel.
type Color struct{ R, G, B uint8 }

// Scene is a picture of W by H millimetres, origin at the top left, y down.
type Scene struct {
	W, H  float64
	Title string // alternative text
	Items []Item
}

// Item is a Line, an Area or a Label.
type Item interface{ item() }

// Line is a straight stroke. Width in mm; Dash lists on/off lengths in mm.
type Line struct {
	X1, Y1, X2, Y2 float64
	Width          float64
	Dash           []float64
	Color          Color
}

// Area is a closed polygon. A nil Fill leaves it empty, Width 0 unstroked.
type Area struct {
	X, Y   []float64
	Fill   *Color
	Width  float64
	Stroke Color
}

// Anchor places a label against its point.
type Anchor int

// Horizontal anchors.
const (
	Left Anchor = iota
	Centre
	Right
)

// Label is a line of text whose baseline starts (or centres, or ends) at X, Y.
// Size is the character height (cap height, as in drawing standards) in mm.
// Turn rotates the text counter-clockwise about X, Y, in degrees (0 or 90).
type Label struct {
	X, Y   float64
	Size   float64
	Anchor Anchor
	Text   string
	Bold   bool
	Turn   float64
	Color  Color
}

func (Line) item()  {}
func (Area) item()  {}
func (Label) item() {}
