package main

import (
	"fmt"
	"io"
	"os"
	"runtime/pprof"
	"strings"

	"github.com/spf13/cobra"
	"golang.org/x/term"

	"hotfront/cmd/internal/report"
	"hotfront/studies"
)

// program is what every command shares: where it reads and writes, and the flags of the root.
type program struct {
	in          io.Reader
	out, err    io.Writer
	cpuProfile  string
	stopProfile func()
}

// execute runs the command line and returns the exit code.
func execute(args []string, in io.Reader, out, errw io.Writer) int {
	p := &program{in: in, out: out, err: errw, stopProfile: func() {}}
	root := p.root()
	root.SetArgs(args)
	root.SetIn(in)
	root.SetOut(out)
	root.SetErr(errw)
	err := root.Execute()
	p.stopProfile()
	if err != nil && err.Error() != "" {
		fmt.Fprintf(errw, "hotfront: %s\n", strings.TrimSpace(err.Error()))
	}
	return exitCode(err)
}

func (p *program) root() *cobra.Command {
	root := &cobra.Command{
		Use:   "hotfront",
		Short: "Searches the design space of a Stirling engine for its Pareto front",
		Long: `hotfront reads a study file with a start design, free variables, limits and aims, works out each design with a
distributed model of the cycle and its losses, and searches for the designs that no other design beats.

` + cautions + `

` + exitHelp,
		Example: `  hotfront new my-engine                       write a study to start from
  hotfront check my-engine.yaml                what is wrong, or what it asks for
  hotfront evaluate my-engine.yaml             the start design, its losses and limits
  hotfront search my-engine.yaml --run runs/a  the front; run it again to go on`,
		SilenceErrors: true, SilenceUsage: true, SuggestionsMinimumDistance: 2,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) > 0 {
				hint := ""
				if near := c.SuggestionsFor(args[0]); len(near) > 0 {
					hint = "; did you mean " + strings.Join(near, " or ") + "?"
				}
				return failed(exitUsage, fmt.Sprintf("unknown command %q%s; see hotfront --help", args[0], hint))
			}
			return nil
		},
		PersistentPreRunE: func(*cobra.Command, []string) error { return p.profile() },
		RunE:              func(c *cobra.Command, _ []string) error { return c.Help() },
	}
	root.SetFlagErrorFunc(func(c *cobra.Command, err error) error {
		return failed(exitUsage, fmt.Sprintf("%s; see %s --help", plainWords(err.Error()), c.CommandPath()))
	})
	root.PersistentFlags().StringVar(&p.cpuProfile, "cpuprofile", "", "write a processor profile to this file")
	root.CompletionOptions.HiddenDefaultCmd = true
	root.AddCommand(p.checkCommand(), p.evaluateCommand(), p.searchCommand(), p.frontCommand(), p.polishCommand(), p.surveyCommand(),
		p.calibrateCommand(), p.fieldsCommand(), p.newCommand(), p.versionCommand())
	return root
}

// plainWords says in plain words what a flag's number is not.
func plainWords(text string) string {
	head, reason, ok := strings.Cut(text, ": strconv.")
	if !ok {
		return text
	}
	wanted := "a whole number is wanted"
	switch {
	case strings.HasSuffix(reason, "out of range"):
		wanted = "the number is too large"
	case strings.HasPrefix(reason, "ParseFloat"):
		wanted = "a number is wanted"
	case strings.HasPrefix(reason, "ParseUint"):
		wanted = "a whole number from 0 on is wanted"
	}
	return head + ": " + wanted
}

const cautions = `Results are estimates for concept work, not a pressure-vessel calculation. Stirling engines hold hot hydrogen or
helium under pressure: tubes creep and burst, hydrogen embrittles metals, permeates hot walls and burns unseen, gases
suffocate, hot parts burn. Local codes for pressure equipment decide, and licensed engineers answer for a design.`

func (p *program) profile() error {
	if p.cpuProfile == "" {
		return nil
	}
	f, err := os.Create(p.cpuProfile)
	if err != nil {
		return err
	}
	if err := pprof.StartCPUProfile(f); err != nil {
		return err
	}
	p.stopProfile = func() {
		pprof.StopCPUProfile()
		if err := f.Close(); err != nil {
			fmt.Fprintf(p.err, "hotfront: %v\n", err)
		}
	}
	return nil
}

// noProblem says why a valid study cannot be searched.
func (p *program) noProblem(file string, err error) error {
	text := strings.TrimPrefix(err.Error(), "studies: make problem: ")
	return failed(exitStudy, fmt.Sprintf("%s: %s; see what it asks for by hotfront check, or work out its start design by hotfront evaluate", file, text))
}

// arguments asks for exactly these arguments, by name.
func arguments(names ...string) cobra.PositionalArgs {
	return func(c *cobra.Command, args []string) error {
		if len(args) != len(names) {
			return failed(exitUsage, fmt.Sprintf("%s takes %s; see %s --help", c.Name(), wanted(names), c.CommandPath()))
		}
		return nil
	}
}

func wanted(names []string) string {
	if len(names) == 0 {
		return "no argument"
	}
	return strings.Join(names, " and ")
}

// format is the --format flag.
type format string

func (f *format) add(c *cobra.Command) {
	*f = "table"
	c.Flags().Var(f, "format", "table, json or csv")
}

func (f *format) String() string { return string(*f) }
func (f *format) Type() string   { return "FORMAT" }
func (f *format) Set(s string) error {
	switch s {
	case "table", "json", "csv":
		*f = format(s)
		return nil
	}
	return fmt.Errorf("%q is none of table, json, csv", s)
}

// style is how tables look on the output: ruled and as wide as the terminal, or plain.
func (p *program) style() report.Style {
	if f, ok := p.out.(*os.File); ok && term.IsTerminal(int(f.Fd())) {
		width, _, err := term.GetSize(int(f.Fd()))
		if err != nil {
			width = 80
		}
		return report.Style{Ruled: true, Width: max(width, 40)}
	}
	return report.Style{Width: 120}
}

// load reads a study and prints what is wrong with it, or its warnings, to the log.
func (p *program) load(file string, sets ...string) (*studies.Study, []byte, error) {
	s, data, issues, err := read(file, sets...)
	for _, i := range issues {
		fmt.Fprintln(p.err, i.String())
	}
	return s, data, err
}

// read reads a study. The study is nil with an error when there are mistakes among the issues.
func read(file string, sets ...string) (*studies.Study, []byte, studies.Issues, error) {
	data, err := os.ReadFile(file)
	if err != nil {
		return nil, nil, nil, err
	}
	s, issues := studies.Load(file, data, sets...)
	if s == nil {
		text := "1 mistake"
		mistakes := issues.Mistakes()
		if n := len(mistakes); n > 1 {
			text = fmt.Sprintf("%d mistakes", n)
		}
		what := "what --set asks for" // unless the file has a mistake of its own
		for i := range mistakes {
			if !strings.HasPrefix(mistakes[i].File, "--set") {
				what = file
			}
		}
		return nil, nil, issues, failed(exitStudy, what+" is not valid: "+text)
	}
	return s, data, issues, nil
}
