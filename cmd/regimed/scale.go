package main

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
	"github.com/spf13/cobra"

	"regimed/api"
	"regimed/api/render"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/similar"
)

// scaleFormats are the forms of a scaling: also the case of the model by itself.
var scaleFormats = []string{"text", "json", "case"}

// scaleFlags are what was given to regimed scale.
type scaleFlags struct {
	factors    map[string]*string // by the name of the factor
	keep, free []string
	fluid      string
	tolerance  float64
}

func newScale() *cobra.Command {
	flags := scaleFlags{factors: map[string]*string{}}
	var format string
	var page render.TextOptions
	cmd := &cobra.Command{
		Use:   "scale FILE|- --length 1:40 --keep GROUP[,GROUP...]",
		Short: "Scale a case to a model: the factors that follow, and what is distorted",
		Long: `Takes a case as the prototype, a scale, and the dimensionless groups that the
model is to keep, and solves for the scale factors of everything else: speed,
time, mass, force, stiffness and so on, as exact powers of what is given. Where
the groups exclude each other it says which do, by how much each would be
distorted, and which property would reconcile them.

The model's case, every quantity scaled by its own factor, is then judged and
compared with the prototype: which groups are kept, which verdicts differ.

A scale is model over prototype: 1:40, 1/40 or 0.025. The fluid and gravity stay
as they are unless another fluid is named, a factor is given, or they are left
--free. Other factors that nothing decides are assumed, and named: the same
material where the case has one, times as length over speed, and so on. Groups
that come first in --keep stay where not all can.

--format case prints the case of the model alone, ready for regimed classify.
Status 1 where the groups exclude each other or the model is no case that can
be judged, 2 on bad input.`,
		Example: `  regimed scale pile.yaml --length 1:40 --keep froude
  regimed scale pile.yaml --length 1:40 --keep froude,cauchy,mass_ratio
  regimed scale deck.yaml --length 1:100 --keep reduced_velocity --speed 1:10
  regimed scale foil.yaml --length 1:5 --keep froude,reynolds --free kinematic_viscosity
  regimed scale pile.yaml --length 1:40 --keep froude --fluid '{name: water, temperature: 18 degC}'
  regimed scale pile.yaml --length 1:40 --keep froude --format case > model.json`,
		Args:              arguments(1, 1, "name one file, or - for standard input"),
		ValidArgsFunction: completeCases,
		RunE: func(cmd *cobra.Command, args []string) error {
			if !slices.Contains(scaleFormats, format) {
				return &usageError{fmt.Errorf("no format is called %q: %s", format, input.OrList(scaleFormats))}
			}
			if err := knownTolerance(flags.tolerance); err != nil {
				return err
			}
			s, err := flags.scale(cmd, args[0])
			if err != nil {
				return said(cmd, err)
			}
			return printScaling(cmd, s, format, page)
		},
	}
	for _, name := range similar.FactorNames() {
		f, _ := similar.FindFactor(name)
		flags.factors[name] = cmd.Flags().String(dashed(name), "", "scale of the "+similar.FactorOf(f).Title)
		completeFlag(cmd, dashed(name), cobra.NoFileCompletions)
	}
	cmd.Flags().StringSliceVar(&flags.keep, "keep", nil, "groups that the model keeps, separated by commas")
	cmd.Flags().StringSliceVar(&flags.free, "free", nil, "what may change as needed: "+input.OrList(similar.FreeNames()))
	cmd.Flags().StringVar(&flags.fluid, "fluid", "", "fluid of the model: a name, or as in a case, {name: water, temperature: 18 degC}")
	addCompareFlags(cmd, scaleFormats, &format, &flags.tolerance, &page)
	cmd.Flags().Lookup("format").Usage = "form of the answer: text, json, or case for the model's case alone"
	completeFlag(cmd, "keep", completeFrom(similar.GroupNames))
	completeFlag(cmd, "free", completeFrom(similar.FreeNames))
	completeFlag(cmd, "fluid", completeFrom(func() []string { return kind.FluidName.Options }))
	return cmd
}

func dashed(name string) string { return strings.ReplaceAll(name, "_", "-") }

// scale makes the request that the service would get, and answers it.
func (f *scaleFlags) scale(cmd *cobra.Command, name string) (*similar.Scaling, error) {
	d, err := readDocument(name, cmd.InOrStdin())
	if err != nil {
		return nil, err
	}
	if _, _, err := input.Decode(d.raw, kind.Schema()); err != nil {
		_, err = d.classify() // says where the file is no JSON
		return nil, err
	}
	body, err := f.body(d.raw)
	if err != nil {
		return nil, err
	}
	request, violations, err := api.ParseScaling(body, kind.Schema())
	if err != nil {
		return nil, refuse(d.name, 0, err.Error())
	}
	if bad := f.refused(d, violations); bad != nil {
		return nil, bad
	}
	s, violations := similar.Scale(request)
	if bad := f.refused(d, violations); bad != nil {
		return nil, bad
	}
	return s, nil
}

// body writes the flags as the request of the service.
func (f *scaleFlags) body(raw []byte) ([]byte, error) {
	request := api.OrderedMembers{{Name: "case", Value: jsontext.Value(raw)}, {Name: "tolerance", Value: f.tolerance}}
	for _, name := range similar.FactorNames() {
		if text := *f.factors[name]; text != "" {
			request = append(request, api.Member{Name: name, Value: text})
		}
	}
	if f.keep != nil {
		request = append(request, api.Member{Name: "keep", Value: f.keep})
	}
	if f.free != nil {
		request = append(request, api.Member{Name: "free", Value: f.free})
	}
	if f.fluid != "" {
		made, _, bad, err := yamlToJSON([]byte(f.fluid))
		if err != nil || len(bad) > 0 {
			return nil, errors.New("--fluid is a name, or a fluid as it stands in a case: {name: water, temperature: 18 degC}")
		}
		request = append(request, api.Member{Name: "fluid", Value: jsontext.Value(made)})
	}
	return json.Marshal(request, jsontext.AllowDuplicateNames(true))
}

// refused tells what is wrong with the file from what is wrong with the flags. It
// returns nil where nothing is.
func (f *scaleFlags) refused(d *document, violations []input.Violation) error {
	var ofCase []input.Violation
	p := &problem{}
	for _, v := range violations {
		if inside, is := strings.CutPrefix(v.Pointer, "/case"); is {
			v.Pointer = inside
			ofCase = append(ofCase, v)
			continue
		}
		flag, _, _ := strings.Cut(strings.TrimPrefix(v.Pointer, "/"), "/")
		p.sentences = append(p.sentences, fmt.Sprintf("--%s: %s: %s", dashed(flag), v.Code, v.Sentence))
	}
	if bad := d.merge(ofCase); len(bad) > 0 {
		p.sentences = append([]string{d.refuseAll(bad).Error()}, p.sentences...)
	}
	if len(p.sentences) == 0 {
		return nil
	}
	return p
}

// printScaling prints a scaling, and returns the status that it means.
func printScaling(cmd *cobra.Command, s *similar.Scaling, format string, page render.TextOptions) error {
	var out []byte
	switch format {
	case "case":
		v := jsontext.Value(similar.AppendCase(nil, s.Model.Case))
		if err := v.Indent(jsontext.WithIndent("  ")); err != nil {
			return err
		}
		out = append(v, '\n')
	case "json":
		data, err := appendRecord(nil, api.NewScalingRecord(s))
		if err != nil {
			return err
		}
		out = data
	default:
		out = render.AppendScaling(nil, s, page)
	}
	if _, err := cmd.OutOrStdout().Write(out); err != nil {
		return err
	}
	if format == "case" {
		for _, v := range s.Model.Violations {
			cmd.PrintErrln(v.Pointer + ": " + string(v.Code) + ": " + v.Sentence)
		}
	}
	if len(s.Exclusions) > 0 || len(s.Model.Violations) > 0 {
		return status(statusUnmet)
	}
	return nil
}
