package main

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"os"
	"os/signal"
	"path/filepath"
	"slices"
	"strings"
	"syscall"

	"github.com/spf13/cobra"

	"regimed/api"
	"regimed/api/render/mapplot"
	"regimed/regime/input"
	"regimed/regime/whatif"
)

// mapFlags are what the command line says about a map.
type mapFlags struct {
	x, y, out string
	width     float64
}

func newMap() *cobra.Command {
	f := &mapFlags{}
	cmd := &cobra.Command{
		Use:   "map FILE|- --x AXIS --y AXIS -o FILE",
		Short: "Draw which class of model holds over two inputs of a case",
		Long: `Draws a map over two inputs of a case, the others as they are: regions by the
recommended class, with borders that are found as roots, not as pixels; the lines
on which an assumption reaches its limit; and the case, with its uncertainty where
one of the two inputs is uncertain. An axis is written

  flow.speed=0.1..10 m/s:log   from one end to the other, logarithmic
  fluid.temperature=5..30 degC   linear
  flow.speed                   a decade either side of the value in the case

An input that the case does not give may be an axis too. The ending of --output
says what is written: .svg, .png, or .json with the polygons for those who draw
them themselves. Prints the name of the file.`,
		Example: `  regimed map riser.yaml --x 'flow.speed=0.1..10 m/s:log' --y 'structure.diameter=0.05..2 m:log' -o map.svg
  regimed map riser.yaml --x flow.speed --y structure.diameter -o map.png --width 120`,
		Args:              arguments(1, 1, "name one file, or - for standard input"),
		ValidArgsFunction: completeCases,
		RunE: func(cmd *cobra.Command, args []string) error {
			if err := f.check(); err != nil {
				return err
			}
			m, err := f.compute(cmd, args[0])
			if err != nil {
				return said(cmd, err)
			}
			made, err := f.render(m)
			if err != nil {
				return err
			}
			if err := os.WriteFile(f.out, made, 0o666); err != nil {
				return err
			}
			_, err = fmt.Fprintln(cmd.OutOrStdout(), f.out)
			return err
		},
	}
	flags := cmd.Flags()
	flags.StringVarP(&f.x, "x", "x", "", "the input along the x axis, with its range")
	flags.StringVarP(&f.y, "y", "y", "", "the input along the y axis, with its range")
	flags.StringVarP(&f.out, "output", "o", "", "file to write: .svg, .png or .json")
	flags.Float64Var(&f.width, "width", mapplot.UsualWidth, fmt.Sprintf("width of the picture in millimetres, from %d to %d", mapplot.LeastWidth, mapplot.LargestWidth))
	completeFlag(cmd, "x", cobra.NoFileCompletions)
	completeFlag(cmd, "y", cobra.NoFileCompletions)
	completeFlag(cmd, "output", func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
		return []cobra.Completion{"svg", "png", "json"}, cobra.ShellCompDirectiveFilterFileExt
	})
	completeFlag(cmd, "width", cobra.NoFileCompletions)
	return cmd
}

// mapEndings are those of the files that a map can be written to.
var mapEndings = []string{".svg", ".png", ".json"}

func (f *mapFlags) ending() string { return strings.ToLower(filepath.Ext(f.out)) }

// check refuses flags that say no map.
func (f *mapFlags) check() error {
	bad := func(format string, args ...any) error { return &usageError{fmt.Errorf(format, args...)} }
	switch {
	case f.x == "" || f.y == "":
		return bad("a map needs --x and --y: %s", whatif.MapAxisForm)
	case f.out == "":
		return bad("--output names the file to write: it ends in %s", input.OrList(mapEndings))
	case !slices.Contains(mapEndings, f.ending()):
		return bad("--output ends in %s, not in %q", input.OrList(mapEndings), f.ending())
	case !(f.width >= mapplot.LeastWidth && f.width <= mapplot.LargestWidth):
		return bad("--width is from %d to %d millimetres, not %g", mapplot.LeastWidth, mapplot.LargestWidth, f.width)
	}
	return nil
}

// compute reads the case and the axes, and computes the map.
func (f *mapFlags) compute(cmd *cobra.Command, file string) (*whatif.Map, error) {
	d, err := readDocument(file, cmd.InOrStdin())
	if err != nil {
		return nil, err
	}
	c, err := d.decode()
	if err != nil {
		return nil, err
	}
	x, y, err := f.axes(c)
	if err != nil {
		return nil, err
	}
	ctx, stop := signal.NotifyContext(cmd.Context(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	m, violations, err := whatif.NewMap(ctx, c, x, y)
	switch {
	case errors.Is(err, context.Canceled):
		return nil, errors.New("the map was interrupted; nothing is written")
	case err != nil:
		return nil, err
	case len(violations) > 0:
		return nil, d.refuseAll(d.merge(violations))
	}
	return m, nil
}

// axes reads both axes, and says of both what is wrong.
func (f *mapFlags) axes(c *input.Case) (x, y whatif.MapAxis, err error) {
	p := &problem{}
	read := func(flag, text string) whatif.MapAxis {
		a, err := whatif.ParseMapAxis(c, text)
		var wrong *whatif.BadAxisError
		if errors.As(err, &wrong) {
			for _, v := range wrong.Violations {
				p.sentences = append(p.sentences, fmt.Sprintf("--%s %q: %s: %s", flag, text, v.Code, v.Sentence))
			}
		}
		return a
	}
	x, y = read("x", f.x), read("y", f.y)
	if len(p.sentences) == 0 && x.Place == y.Place {
		p.sentences = append(p.sentences, fmt.Sprintf("--y %q: %s: %s is already the input of --x; a map needs two.", f.y, input.Contradiction, y.Name()))
	}
	if len(p.sentences) > 0 {
		return x, y, p
	}
	return x, y, nil
}

// render writes a map in the form that the ending of the file asks for.
func (f *mapFlags) render(m *whatif.Map) ([]byte, error) {
	if f.ending() == ".json" {
		return appendRecord(nil, api.NewMapRecord(m))
	}
	format, err := mapplot.FormatOf(f.out)
	if err != nil {
		return nil, err
	}
	var picture bytes.Buffer
	if err := mapplot.Draw(&picture, format, m, f.width); err != nil {
		return nil, err
	}
	return picture.Bytes(), nil
}
