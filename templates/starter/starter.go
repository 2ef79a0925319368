// Package starter holds commented case files to begin a new case from: one per
// kind of body. Every name and number in them is invented.
package starter

import (
	"embed"
	"strings"
)

//go:generate go run ../../cmd/stillair schema -o stillair.schema.json

//go:embed *.yaml
var files embed.FS

// kinds lists the starters in the order a newcomer should meet them.
var kinds = []Kind{
	{"indoor-panel", "sealed control panel in a switch room: warm day, ventilation failed, cold start"},
	{"panel", "sealed control panel outdoors: sun, shade, winter and humid night"},
	{"cabinet", "indoor cabinet between neighbours, US units"},
	{"steam-pipe", "insulated steam pipe with a metal jacket"},
	{"bare-pipe", "the same pipe without insulation: shows a failed limit"},
	{"vessel", "insulated hot vessel with dished heads"},
	{"plate", "heated plate, upright and leaning"},
	{"cylinder", "electronics can, a standing cylinder"},
	{"sphere", "lamp globe"},
}

// Kind is a starter case and what it shows.
type Kind struct{ Name, About string }

// Kinds lists the starters in the order a newcomer should meet them.
func Kinds() []Kind { return append([]Kind(nil), kinds...) }

// Names lists the names that Get understands, in the order of Kinds.
func Names() []string {
	names := make([]string, len(kinds))
	for i, k := range kinds {
		names[i] = k.Name
	}
	return names
}

// Get is the text of the starter case of that name, without ".yaml". The
// second result is false when there is none.
func Get(name string) ([]byte, bool) {
	if strings.ContainsAny(name, `/\.`) {
		return nil, false
	}
	text, err := files.ReadFile(name + ".yaml")
	return text, err == nil
}
