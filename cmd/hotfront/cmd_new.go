package main

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"regexp"

	"github.com/spf13/cobra"

	"hotfront/studies"
)

type newOptions struct {
	from string
	list bool
}

func (p *program) newCommand() *cobra.Command {
	var o newOptions
	c := &cobra.Command{
		Use:   "new [NAME]",
		Short: "Writes a study that runs, to start from",
		Long:  "new writes NAME.yaml, a copy of a shipped study under that name. It asks nothing and overwrites nothing.",
		Example: `  hotfront new my-engine
  hotfront new --list
  hotfront new dish --from plateau-solar-dish`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) > 1 {
				return failed(exitUsage, "new takes one name at most; see hotfront new --help")
			}
			return nil
		},
		RunE: func(_ *cobra.Command, args []string) error {
			name := ""
			if len(args) == 1 {
				name = args[0]
			}
			return p.newStudy(name, &o)
		},
	}
	c.Flags().StringVar(&o.from, "from", "sawmill-heat-and-power", "shipped study to copy")
	c.Flags().BoolVar(&o.list, "list", false, "list the shipped studies")
	return c
}

func (p *program) newStudy(name string, o *newOptions) error {
	examples, err := studies.Examples()
	if err != nil {
		return err
	}
	if o.list {
		for _, e := range examples {
			s, issues := studies.Load(e.Name, e.Data)
			if s == nil {
				return issues
			}
			if _, err := fmt.Fprintf(p.out, "%-26s  %s\n", e.Name, s.About); err != nil {
				return err
			}
		}
		return nil
	}
	if name == "" {
		name = "my-engine"
	}
	if !regexp.MustCompile(`^[A-Za-z0-9][A-Za-z0-9_-]*$`).MatchString(name) {
		return failed(exitUsage, fmt.Sprintf("%q is no name for a study: letters, digits, - and _", name))
	}
	for _, e := range examples {
		if e.Name != o.from {
			continue
		}
		data := bytes.Replace(e.Data, []byte("study: "+e.Name), []byte("study: "+name), 1)
		file := name + ".yaml"
		f, err := os.OpenFile(file, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
		if errors.Is(err, fs.ErrExist) {
			return fmt.Errorf("%s is there already", file)
		} else if err != nil {
			return err
		}
		if _, err := f.Write(data); err != nil {
			return errors.Join(err, f.Close())
		}
		if err := f.Close(); err != nil {
			return err
		}
		fmt.Fprintf(p.out, "Wrote %s. Next: hotfront check %s; hotfront search %s --run runs/%s\n", file, file, file, name)
		return nil
	}
	return failed(exitUsage, fmt.Sprintf("no shipped study %q; see hotfront new --list", o.from))
}
