// Package catalogue reads the tables built into the program and finds their
// entries by the words people use for them. Every table is a CSV file with a
// header line; an entry is known by its id and by its name.
package catalogue

import (
	"crypto/sha256"
	"encoding/csv"
	"encoding/hex"
	"fmt"
	"slices"
	"strconv"
	"strings"
	"unicode"
)

// Row is one line of a table, its fields known by the header of their column.
type Row struct {
	line   int
	fields []string
	column map[string]int
}

// Read parses a table whose first line names the columns.
func Read(table string) ([]Row, error) {
	records, err := csv.NewReader(strings.NewReader(table)).ReadAll()
	if err != nil {
		return nil, fmt.Errorf("read table: %w", err)
	}
	if len(records) == 0 {
		return nil, fmt.Errorf("read table: it has no header line")
	}
	column := make(map[string]int)
	for i, name := range records[0] {
		column[name] = i
	}
	rows := make([]Row, 0, len(records)-1)
	for i, fields := range records[1:] {
		rows = append(rows, Row{line: i + 2, fields: fields, column: column})
	}
	return rows, nil
}

// Text is the field of a column; a column that the table lacks is empty.
func (r Row) Text(column string) string {
	i, ok := r.column[column]
	if !ok {
		return ""
	}
	return r.fields[i]
}

// Number is the number in a column. An empty field is no number and no error.
func (r Row) Number(column string) (value float64, given bool, err error) {
	text := r.Text(column)
	if text == "" {
		return 0, false, nil
	}
	value, err = strconv.ParseFloat(text, 64)
	if err != nil {
		return 0, false, fmt.Errorf("table record %d, column %s: %q is not a number", r.line, column, text)
	}
	return value, true, nil
}

// Version identifies the content of a table: the first twelve digits of its
// SHA-256 in hexadecimal.
func Version(table string) string {
	sum := sha256.Sum256([]byte(table))
	return hex.EncodeToString(sum[:])[:12]
}

// Find looks an entry up among n: by its id, by its whole name, or as the only
// entry whose name holds all the words, in any order. The function entry gives
// the id and the name of an entry. Case, punctuation, extra spaces and American
// spelling make no difference.
func Find(words string, n int, entry func(i int) (id, name string)) (index int, found bool) {
	names := make([]string, n)
	for i := range n {
		id, name := entry(i)
		if strings.EqualFold(strings.TrimSpace(words), id) {
			return i, true
		}
		names[i] = name
	}
	want := Normal(words)
	if i := slices.IndexFunc(names, func(name string) bool { return Normal(name) == want }); i >= 0 && want != "" {
		return i, true
	}
	if hold := Holding(words, names); len(hold) == 1 {
		return slices.Index(names, hold[0]), true
	}
	return 0, false
}

// Holding lists the names that hold all the words, whole and in any order.
func Holding(words string, names []string) (hold []string) {
	want := strings.Fields(Normal(words))
	if len(want) == 0 {
		return nil
	}
	for _, name := range names {
		has := strings.Fields(Normal(name))
		if !slices.ContainsFunc(want, func(w string) bool { return !slices.Contains(has, w) }) {
			hold = append(hold, name)
		}
	}
	return hold
}

// american lists the spellings that differ from those of the tables.
var american = map[string]string{
	"aluminum": "aluminium", "gray": "grey", "anodized": "anodised", "oxidized": "oxidised",
	"galvanized": "galvanised", "fiber": "fibre", "fiberglass": "fibreglass", "color": "colour",
}

// Normal reduces a name to what Find compares: lower case, words separated by
// single spaces, no punctuation, British spelling.
func Normal(name string) string {
	plain := strings.NewReplacer("²", "2", "³", "3", "µ", "u", "°", "").Replace(strings.ToLower(name))
	words := strings.FieldsFunc(plain, func(r rune) bool {
		return !unicode.IsLetter(r) && !unicode.IsDigit(r) && r != '.'
	})
	for i, w := range words {
		if british, ok := american[w]; ok {
			words[i] = british
		}
	}
	return strings.Join(words, " ")
}

// confidences from lowest to highest.
var confidences = []string{"low", "medium", "high"}

// LowerConfidence is the lower of two confidence words, "low", "medium" or
// "high". Any other word counts as lower than these.
func LowerConfidence(a, b string) string {
	if slices.Index(confidences, b) < slices.Index(confidences, a) {
		return b
	}
	return a
}
