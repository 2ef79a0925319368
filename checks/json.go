package checks

import (
	"bytes"
	"encoding/json"
)

// JSON writes an outcome, or the report of an error, in the one form in which
// it leaves the program: indented, ending in a line feed, no escapes for & < >.
func JSON(v any) ([]byte, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	err := e.Encode(v)
	return b.Bytes(), err
}
