package casefile

import "slices"

// rule is what a code means.
type ruling struct{ code, text string }

// rulings explains every code. Codes are stable: a number is never used for
// another meaning. E-5xx are warnings.
var rulings = []ruling{
	{"E-101", "The file is larger than 1 MiB or has more than 5000 lines. A case file describes one body and is a few kilobytes long. Line lists belong in a CSV file."},
	{"E-102", "The file is not text in UTF-8, or it holds control characters or characters that change the reading direction. Save it as UTF-8 text. The place is the first such character."},
	{"E-103", "The file is not valid YAML at this place. Common causes: a tab instead of spaces, a missing space after a colon, a bracket that is not closed, or a text that holds a colon or a # and needs quotes. Nothing after such a place can be read, so it is reported alone."},
	{"E-104", "The file holds more than one YAML document (a line ---) or a directive (a line beginning with %). Write one case in one file."},
	{"E-105", "The file uses an anchor (&), an alias (*) or a merge key (<<). They are not read, since a reader of the printed file should see each value where it counts. Load cases change single inputs without repeating the rest."},
	{"E-106", "The file uses a YAML tag (a word after !). Tags are not read; write the value itself."},
	{"E-107", "Brackets or lists are nested far deeper than any case needs. Look for a bracket that was opened and never closed."},
	{"E-108", "The file is empty, holds comments only, or does not begin with a key. A case begins with title:, surroundings: and body:."},
	{"E-199", "There are more findings than are shown. Mend those shown first; the rest often goes with them."},
	{"E-201", "The key is not known in this section. Keys that are not known are never passed over, since a misspelt key would leave a default in its place without anybody noticing. The finding names the nearest key that is right here."},
	{"E-202", "The key exists, but in another section. Move it there. A frequent case is air: at the top of the file instead of in surroundings:."},
	{"E-203", "The same key stands twice in one section. YAML readers differ in which one they take, so neither is taken. Remove one."},
	{"E-204", "A required key is missing. The finding shows an example of what is expected. The air temperature may also come from a setting or from every load case."},
	{"E-205", "A key or a section stands there without a value. Give it a value or remove it."},
	{"E-206", "The value has another form than expected: a list where one value belongs, one value where a section of keys belongs, or the like."},
	{"E-207", "The section body: needs exactly one kind of body: plate, cylinder, pipe, sphere, box or vessel."},
	{"E-208", "Neither heat nor contents is given. A body is driven either by the heat it must shed (heat: 250 W) or by the temperature its contents hold (contents: 184 °C)."},
	{"E-301", "The text cannot be read as a number with a unit. A number has a decimal point, no comma, no fraction and no separators: 1.5 mm, 250 W, 40 °C. Only finite numbers are read."},
	{"E-302", "The unit does not fit, is not known or is missing. Quantities carry their unit; only plain shares and factors stand alone. A temperature difference is written in K or Δ°F, since 10 °C is a temperature and 10 K a difference. Write one line in a unit and brackets below it: W/(m²·K)."},
	{"E-303", "The value is impossible or far outside what the calculation is for: a length that is not positive, an emissivity outside 0 to 1, a temperature below absolute zero, a humidity above 100 %. The finding gives the range."},
	{"E-304", "The word is not one of those that can stand here. The finding lists them and names the nearest."},
	{"E-305", "The body has no face or place of this name. The faces follow from the kind of body and the direction of its axis: a box has front, back, left, right, top and bottom; a lying cylinder has side, left end and right end."},
	{"E-306", "The finish is not in the finish table, or the words typed fit several entries. Words find an entry when its name alone holds all of them. Use the name or the id of an entry, or type emissivity: and absorptance: instead."},
	{"E-307", "The material is not in the material table, or the words typed fit several entries. Words find an entry when its name alone holds all of them. Use the name or the id of an entry, or type conductivity: beside it; then the material can have any name."},
	{"E-308", "There is no burn threshold for this surface material. What counts is the material a person touches, coating included."},
	{"E-309", "The limit table has no entry of this id that a temperature can be judged against."},
	{"E-310", "There is no such situation of free convection. The keys of methods: are situations, such as vertical plate."},
	{"E-311", "There is no correlation of this name for the situation. Each situation takes only correlations that were published for it."},
	{"E-312", "The text holds a control character or is longer than 4000 characters."},
	{"E-313", "A list has more than 200 entries. Split the case into several files."},
	{"E-401", "heat and contents are both given. A body is driven by one of them. A load case may use the other one: it then replaces the one of the case."},
	{"E-402", "altitude and pressure are both given. Both fix the air pressure; type one."},
	{"E-403", "The wall is thicker than half of the smallest outside size, so nothing is left inside. The wall lies within the outside size of the bare body, layers lie outside."},
	{"E-404", "A limit has exactly one criterion: most, least, rise, touch, rule or condensation. Write two limits for two criteria."},
	{"E-405", "A limit of the project needs its reason (why:) or its source (source: a standard with edition), so that a checker can judge it. Touch limits and rules carry their own source."},
	{"E-406", "The limit is set for a place this body does not have or that has no temperature of its own: inside air is in a box only, a covered face is not calculated, and touch or condensation needs a face."},
	{"E-407", "Two load cases have the same name. Results are told apart by that name."},
	{"E-408", "A limit forbids condensation, but no load case has a humidity, so there is no dew point to compare with."},
	{"E-409", "A face is in the sun, but nobody said how much of it the surface takes up. Type absorptance: or choose a finish with a solar absorptance. Emissivity is no substitute: a white paint radiates like a black one and takes up far less sun."},
	{"E-410", "Neither a finish nor an emissivity is given. Radiation is often half of the heat and cannot be left open."},
	{"E-411", "A wall or layer has neither a material nor a conductivity."},
	{"E-412", "A load case changes inputs of the body, not its kind. Write another case file for another body."},
	{"E-413", "Every face of the body is covered, so no heat can leave it."},
	{"E-414", "A touch limit needs the surface material (touch:) and the contact time (contact:) together."},
	{"E-415", "A setting that stands in for a missing input cannot be read. Change the setting or type the value in the case."},
	{"E-416", "The section inside: belongs to a box. Other bodies have no inside air."},
	{"E-501", "Warning. The emissivity of the finish rests on sources of low confidence, such as values quoted from memory or for another band. Its range enters the uncertainty; a measured value is better."},
	{"E-502", "Warning. The emissivity of the finish was published for the band of an infrared camera (8 µm to 14 µm) or without stating its band. A heat balance needs the total emissivity, which can be much lower, for bare and anodised metal above all."},
	{"E-503", "Warning. The conductivity of the material rests on sources of low confidence. Where the layer matters, type the conductivity from the maker's data sheet."},
	{"E-504", "Warning. Thresholds for contact of less than 1 s suppose unintended touch by a person who lets go at once. Children, the elderly and people who hold on need longer contact times."},
	{"E-505", "Warning. Sun or a radiant temperature is given for a covered face. A covered face sheds and takes up no heat, so the value has no effect."},
	{"E-506", "Warning. The load case changes the air temperature while a typed radiant temperature stays. On a cold night the surroundings are rarely as warm as on a summer day."},
	{"E-507", "Warning. A temperature is typed in kelvin and lies below 150 K (-123 °C). A number like that is mostly meant in °C, or as a rise over the air, which has a key of its own in limits (rise: 55 K)."},
}

// Codes lists the codes of all findings.
func Codes() []string {
	var codes []string
	for _, r := range rulings {
		codes = append(codes, r.code)
	}
	return codes
}

// Explain gives the paragraph for a code.
func Explain(code string) (string, bool) {
	i := slices.IndexFunc(rulings, func(r ruling) bool { return r.code == code })
	if i < 0 {
		return "", false
	}
	return rulings[i].text, true
}

func severityOf(code string) Severity {
	if code >= "E-5" {
		return Warning
	}
	return Error
}
