package studies

import (
	"embed"
	"io/fs"
	"strings"
)

//go:embed examples/*.yaml
var examples embed.FS // read only; embedding leaves no other way than a variable

// Example is a study that comes with the program.
type Example struct {
	Name string // without .yaml
	Data []byte
}

// Examples gives the shipped studies by name.
func Examples() ([]Example, error) {
	names, err := fs.Glob(examples, "examples/*.yaml")
	if err != nil {
		return nil, err
	}
	var list []Example
	for _, name := range names {
		data, err := examples.ReadFile(name)
		if err != nil {
			return nil, err
		}
		base := strings.TrimSuffix(strings.TrimPrefix(name, "examples/"), ".yaml")
		list = append(list, Example{Name: base, Data: data})
	}
	return list, nil
}
