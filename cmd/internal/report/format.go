package report

import (
	"encoding/csv"
	"encoding/json"
	"io"
)

// JSON writes a value with indents and a line end.
func JSON(w io.Writer, v any) error {
	e := json.NewEncoder(w)
	e.SetIndent("", "  ")
	e.SetEscapeHTML(false)
	return e.Encode(v)
}

// CSV writes a head and rows.
func CSV(w io.Writer, head []string, rows [][]string) error {
	c := csv.NewWriter(w)
	if err := c.Write(head); err != nil {
		return err
	}
	if err := c.WriteAll(rows); err != nil {
		return err
	}
	return c.Error()
}

// Caution is printed with every design.
const Caution = `Concept estimates, not a pressure-vessel calculation. Hot hydrogen and helium under pressure burst, burn and
suffocate; metals creep. Local codes and licensed engineers decide.`
