package main

import (
	"errors"
	"fmt"
	"strings"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
	"github.com/spf13/cobra"

	"regimed/api"
	"regimed/api/table"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

// request reads what is to be swept: a plan, or a case with axes and columns,
// which are put together to the plan that the service would get.
func (f *sweepFlags) request(cmd *cobra.Command, args []string) (*whatif.Request, error) {
	if f.plan != "" {
		return readPlan(f.plan, cmd)
	}
	d, err := readDocument(args[0], cmd.InOrStdin())
	if err != nil {
		return nil, err
	}
	body, err := f.body(d.raw)
	if err != nil {
		return nil, err
	}
	r, violations, err := whatif.DecodeRequest(body, kind.Schema(), table.Formats)
	if err != nil { // only the case can be no JSON
		return nil, d.noJSON(d.raw)
	}
	return r, f.refused(d, violations)
}

// readPlan reads a whole request from a file.
func readPlan(file string, cmd *cobra.Command) (*whatif.Request, error) {
	d, err := readInto(&document{whole: true}, file, cmd.InOrStdin())
	if err != nil {
		return nil, err
	}
	r, violations, err := whatif.DecodeRequest(d.raw, kind.Schema(), table.Formats)
	var syntax *input.SyntaxError
	if errors.As(err, &syntax) {
		return nil, refuse(d.name, lineOfOffset(d.raw, syntax.Offset), syntax.Sentence)
	}
	if bad := d.merge(violations); len(bad) > 0 {
		return nil, d.refuseAll(bad)
	}
	return r, nil
}

// body writes the flags as the request of the service.
func (f *sweepFlags) body(raw []byte) ([]byte, error) {
	axes := f.axes
	if axes == nil {
		axes = []string{}
	}
	request := api.OrderedMembers{{Name: "case", Value: jsontext.Value(raw)}, {Name: "axes", Value: axes}}
	if len(f.columns) > 0 {
		request = append(request, api.Member{Name: "columns", Value: f.columns})
	}
	return json.Marshal(request, jsontext.AllowDuplicateNames(true), jsontext.AllowInvalidUTF8(true))
}

// refused tells what is wrong with the file from what is wrong with the flags. It
// returns nil where nothing is.
func (f *sweepFlags) refused(d *document, violations []input.Violation) error {
	var ofCase []input.Violation
	p := &problem{}
	for _, v := range violations {
		if inside, is := strings.CutPrefix(v.Pointer, "/case"); is {
			v.Pointer = inside
			ofCase = append(ofCase, v)
			continue
		}
		p.sentences = append(p.sentences, fmt.Sprintf("%s: %s: %s", f.flagOf(v.Pointer), v.Code, v.Sentence))
	}
	if bad := d.merge(ofCase); len(bad) > 0 {
		p.sentences = append([]string{d.refuseAll(bad).Error()}, p.sentences...)
	}
	if len(p.sentences) == 0 {
		return nil
	}
	return p
}

// flagOf names the flag that a place in the request comes from, with its value.
func (f *sweepFlags) flagOf(pointer string) string {
	var i int
	if _, err := fmt.Sscanf(pointer, "/axes/%d", &i); err == nil && i < len(f.axes) {
		return fmt.Sprintf("--axis %q", f.axes[i])
	}
	if _, err := fmt.Sscanf(pointer, "/columns/%d", &i); err == nil && i < len(f.columns) {
		return fmt.Sprintf("--column %q", f.columns[i])
	}
	return "--axis"
}
