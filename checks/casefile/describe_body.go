package casefile

import (
	"slices"

	"stillair/checks/unit"
)

// body has exactly one of its parts.
var body = &input{key: "body", help: "The body: exactly one kind.", form: section, required: true, parts: []*input{
	bodyKind("plate", "A thin plate that sheds heat from both faces.",
		length("width", "Width of the plate.", "400 mm"),
		length("height", "Height of the plate, along its slope when it is tilted.", "300 mm"),
		&input{key: "tilt", label: "tilt from the vertical", help: "Angle from the vertical; positive when the front turns up.", form: quantity, kind: unit.Angle, span: quarterTurn, usual: "0 deg", why: "a vertical plate", example: "0 deg"},
		layers, facesInput(facesOf("plate", "")...)),
	bodyKind("cylinder", "A cylinder with its two ends.",
		length("diameter", "Outside diameter of the bare cylinder.", "200 mm"),
		length("length", "Length of the cylinder.", "400 mm"),
		axis(""), wall, layers, facesInput("side", "top", "bottom", "left end", "right end")),
	bodyKind("pipe", "A stretch of pipe without ends.",
		length("diameter", "Outside diameter of the bare pipe.", "114.3 mm"),
		&input{key: "length", label: "length", help: "Length of the pipe.", form: quantity, kind: unit.Length, span: size, usual: "1 m", why: "results per metre of pipe", example: "1 m"},
		axis("horizontal"), wall, layers),
	bodyKind("sphere", "A sphere.",
		length("diameter", "Outside diameter of the bare sphere.", "500 mm"), wall, layers),
	bodyKind("box", "A closed box with air inside, such as a panel or cabinet.",
		length("width", "Outside width of the bare box.", "600 mm"),
		length("height", "Outside height of the bare box.", "800 mm"),
		length("depth", "Outside depth of the bare box.", "250 mm"),
		wall, layers, facesInput(facesOf("box", "")...)),
	bodyKind("vessel", "A cylindrical shell closed by two heads.",
		length("diameter", "Outside diameter of the bare shell.", "1200 mm"),
		length("length", "Length of the straight shell.", "3 m"),
		axis("vertical"),
		&input{key: "heads", label: "heads", help: "Form of the heads; dished heads are 2:1 semi-ellipsoidal.", form: word, words: fixed("form of head", "dished", "flat"), usual: "dished", why: "usual for pressure vessels", example: "dished"},
		wall, layers, facesInput("shell", "top head", "bottom head", "left head", "right head")),
}}

// bodyKind is a kind of body with its own parts and those all bodies share.
func bodyKind(key, help string, own ...*input) *input {
	return &input{key: key, help: help, form: section, parts: append(slices.Clone(own), finish, emissivity, absorptance)}
}

func length(key, help, example string) *input {
	return &input{key: key, label: key, help: help, form: quantity, kind: unit.Length, span: size, required: true, example: example}
}

func axis(usual string) *input {
	in := &input{key: "axis", label: "axis", help: "Direction of the axis.", form: word, words: fixed("direction", "horizontal", "vertical"),
		usual: usual, required: usual == "", example: "horizontal"}
	if usual != "" {
		in.why = "the usual position"
	}
	return in
}

func facesInput(names ...string) *input {
	return &input{key: "faces", help: "Faces that shed no heat, with the reason.", form: byName, names: names,
		each: &input{label: "face", help: "What covers this face; free when nothing does.", form: word,
			words: faceStates, usual: free, why: "every face sheds heat", example: "wall"}}
}

var faceStates = fixed("state of a face", "covered", "wall", "floor", "neighbour", free)

// free is the state of a face that sheds heat.
const free = "free"

var layerParts = []*input{
	{key: "material", label: "material", help: "Name in the material table, or any name when the conductivity is typed.", example: "steel, design value"},
	{key: "thickness", label: "thickness", help: "Thickness.", form: quantity, kind: unit.Length, span: thickness, required: true, example: "1.5 mm"},
	{key: "conductivity", label: "conductivity", help: "Thermal conductivity; left out, that of the material at its mean temperature.",
		form: quantity, kind: unit.Conductivity, span: conductivity, example: "0.05 W/(m·K)"},
}

var wall = &input{key: "wall", label: "wall", help: "The wall, within the outside size of the bare body; left out, it is not modelled.", form: section, parts: layerParts}

var layers = &input{key: "layers", label: "layer", help: "Layers on the outside, from the wall outwards. Typed in a load case, the list replaces the whole list of the case.", form: list,
	each: &input{help: "One layer.", form: section, parts: layerParts}}

var finish = &input{key: "finish", label: "finish", help: "Name in the finish table, which gives emissivity and solar absorptance.",
	form: word, words: finishes, example: "light grey paint (near RAL 7035)"}

var emissivity = &input{key: "emissivity", label: "emissivity outside", help: "Emissivity of the outside, instead of that of the finish.",
	form: quantity, kind: unit.Ratio, span: fraction, example: "0.9"}

var absorptance = &input{key: "absorptance", label: "solar absorptance", help: "Share of the sun that the outside takes up, instead of that of the finish.",
	form: quantity, kind: unit.Ratio, span: fraction, example: "0.45"}
