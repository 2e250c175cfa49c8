package main

import (
	"fmt"
	"runtime"
	"runtime/debug"

	"github.com/spf13/cobra"

	"hotfront/cmd/internal/report"
	"hotfront/model"
)

// programVersion is that of the program; the model has its own.
const programVersion = "0.1.0"

type versionJSON struct {
	Program   string            `json:"program"`
	Model     string            `json:"model"`
	Go        string            `json:"go"`
	Platform  string            `json:"platform"`
	Libraries map[string]string `json:"libraries"`
}

func (p *program) versionCommand() *cobra.Command {
	var f format
	c := &cobra.Command{
		Use:     "version",
		Short:   "Versions of program, model and libraries",
		Example: "  hotfront version --format json",
		Args:    arguments(),
		RunE:    func(*cobra.Command, []string) error { return p.version(f) },
	}
	f.add(c)
	return c
}

func (p *program) version(f format) error {
	v := versionJSON{Program: programVersion, Model: model.Version, Go: runtime.Version(), Platform: runtime.GOOS + "/" + runtime.GOARCH, Libraries: map[string]string{}}
	var names [][]string
	if info, ok := debug.ReadBuildInfo(); ok {
		for _, d := range info.Deps {
			v.Libraries[d.Path] = d.Version
			names = append(names, []string{d.Path, d.Version})
		}
	}
	head := [][]string{{"hotfront", v.Program}, {"model", v.Model}, {"Go", v.Go}, {"platform", v.Platform}}
	switch f {
	case "json":
		return report.JSON(p.out, v)
	case "csv":
		return report.CSV(p.out, []string{"name", "version"}, append(head, names...))
	}
	for _, h := range head {
		fmt.Fprintf(p.out, "%-10s %s\n", h[0], h[1])
	}
	table := report.Table{Title: "\nLibraries", Rows: names, Left: []int{1}}
	return table.Write(p.out, report.Style{})
}
