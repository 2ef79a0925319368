package main

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/goccy/go-yaml"
	"github.com/goccy/go-yaml/ast"
	"github.com/goccy/go-yaml/parser"

	"stillair/checks/casefile"
)

// Codes of what can be wrong in a settings file; those of the case file are
// explained by its own reader.
const (
	codeSettingsSyntax  = "E-901"
	codeSettingsUnknown = "E-902"
	codeSettingsValue   = "E-903"
)

// settingsCodes explains them.
var settingsCodes = map[string]string{
	codeSettingsSyntax:  "The settings file is not YAML of the form \"key: text\", one key a line. Quote a text that\nholds a colon or a number sign. A key may stand there once.",
	codeSettingsUnknown: "The settings file has a key that does not exist. It is refused, because a misspelt key would\notherwise be without effect and nobody would notice. \"stillair settings\" lists the keys.",
	codeSettingsValue:   "A value in the settings file cannot be used. \"stillair settings\" says what each key takes.",
}

// checkSettingsFile finds everything that is wrong with a settings file, with
// its place.
func checkSettingsFile(path string, text []byte) []casefile.Finding {
	lines := strings.Split(string(text), "\n")
	file, err := parser.ParseBytes(text, 0)
	if err != nil {
		return []casefile.Finding{syntaxFinding(path, lines, err)}
	}
	var found []casefile.Finding
	for _, doc := range file.Docs {
		for _, pair := range pairs(doc.Body) {
			if f := checkPair(pair); f != nil {
				f.File, f.Source = path, lineAt(lines, f.Line)
				found = append(found, *f)
			}
		}
		if bad := notAMapping(doc.Body); bad != nil {
			bad.File, bad.Source = path, lineAt(lines, bad.Line)
			found = append(found, *bad)
		}
	}
	return found
}

func lineAt(lines []string, n int) string {
	if n < 1 || n > len(lines) {
		return ""
	}
	return strings.TrimSuffix(lines[n-1], "\r")
}

// pairs lists the key-value pairs of a mapping.
func pairs(n ast.Node) []*ast.MappingValueNode {
	switch m := n.(type) {
	case *ast.MappingNode:
		return m.Values
	case *ast.MappingValueNode:
		return []*ast.MappingValueNode{m}
	}
	return nil
}

func notAMapping(n ast.Node) *casefile.Finding {
	switch n.(type) {
	case nil, *ast.MappingNode, *ast.MappingValueNode, *ast.NullNode, *ast.CommentGroupNode:
		return nil
	}
	return at(n, casefile.Finding{Code: codeSettingsSyntax, Message: "The settings file is a list of settings, one key a line.",
		Expected: "key: value", Width: 1})
}

func checkPair(pair *ast.MappingValueNode) *casefile.Finding {
	key := pair.Key.String()
	if !slices.Contains(settingKeys(), key) {
		return at(pair.Key, casefile.Finding{Code: codeSettingsUnknown, Message: fmt.Sprintf("There is no setting %q.", key),
			Found: key, Expected: strings.Join(settingKeys(), ", "), Nearest: nearest(key, settingKeys()), Width: len([]rune(key))})
	}
	switch v := pair.Value.(type) {
	case *ast.StringNode:
		if message, help := settingOf(key).wrong(v.Value); message != "" {
			return at(v, casefile.Finding{Code: codeSettingsValue, Path: key, Message: capital(key) + ": " + message, Help: help,
				Width: len([]rune(v.Value))})
		}
		return nil
	case *ast.NullNode:
		return nil
	}
	return at(pair.Value, casefile.Finding{Code: codeSettingsValue, Path: key, Message: fmt.Sprintf("The setting %q takes a text.", key),
		Found: pair.Value.String(), Expected: "a text; a quantity has its unit", Width: 1})
}

func at(n ast.Node, f casefile.Finding) *casefile.Finding {
	if p := n.GetToken().Position; p != nil {
		f.Line, f.Column = p.Line, p.Column
	}
	return &f
}

// syntaxFinding turns an error of the YAML reader into a finding.
func syntaxFinding(path string, lines []string, err error) casefile.Finding {
	f := casefile.Finding{Code: codeSettingsSyntax, File: path, Line: 1, Column: 1, Width: 1,
		Message: "The settings file is not YAML that can be read."}
	var y yaml.Error
	if errors.As(err, &y) {
		f.Found = y.GetMessage()
		if t := y.GetToken(); t != nil && t.Position != nil {
			f.Line, f.Column = t.Position.Line, t.Position.Column
		}
	}
	f.Source = lineAt(lines, f.Line)
	return f
}
