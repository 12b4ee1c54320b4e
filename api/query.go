package api

import (
	"errors"
	"fmt"
	"net/url"
	"reflect"
	"slices"
	"strconv"
	"strings"

	"github.com/go-playground/validator/v10"
	"github.com/labstack/echo/v4"

	"regimed/api/render"
	"regimed/regime/input"
	"regimed/regime/whatif"
)

// validate checks what comes in a query. Names in its errors are those of the
// parameters.
var validate = newValidator()

func newValidator() *validator.Validate {
	v := validator.New(validator.WithRequiredStructEnabled())
	v.RegisterTagNameFunc(func(f reflect.StructField) string { return f.Tag.Get("query") })
	if err := v.RegisterValidation("member", isMember); err != nil {
		panic("api: " + err.Error()) // only for a name that the package refuses
	}
	return v
}

func isMember(f validator.FieldLevel) bool {
	_, err := render.ParseFields([]string{f.Field().String()})
	return err == nil
}

// classifyQuery are the parameters of a classification. The bounds of samples are
// those of package whatif.
type classifyQuery struct {
	Fields  []string `query:"fields" validate:"max=32,dive,required,max=64,member"`
	Samples *int     `query:"samples" validate:"omitempty,gte=64,lte=65536"`
	WhatIf  *string  `query:"what_if" validate:"omitempty,oneof=true false"`
}

// classifyOptions reads which members of the answer are wanted, in which form
// (nil: JSON), and what is asked about the case besides. explore says whether it
// is explored where the query does not say.
func classifyOptions(c echo.Context, explore bool) (render.Fields, *format, whatif.Options, error) {
	only, values, o, err := caseOptions(c, explore, func(values url.Values, bad []input.Violation) []input.Violation {
		return checkForm(bad, values.Get("format"), values.Has("format"), values.Has("fields"))
	}, "format")
	if err != nil {
		return 0, nil, o, err
	}
	form, err := wantedForm(c, values.Get("format"), values.Has("fields"))
	return only, form, o, err
}

// answerOptions reads what is asked about a case whose answer is kept whole.
func answerOptions(c echo.Context) (whatif.Options, error) {
	values, violations, err := parameters(c, "samples", "what_if")
	if err != nil {
		return whatif.Options{}, err
	}
	var q classifyQuery
	violations = append(append(violations, q.read(values)...), check(&q, values)...)
	if len(violations) > 0 {
		return whatif.Options{}, violated(invalidQuery, "The query", violations)
	}
	return q.options(true), nil
}

// caseOptions reads the parameters that every path with cases has. Others may
// stand beside them, which checkOthers adds its violations about; nil: none.
func caseOptions(c echo.Context, explore bool, checkOthers func(url.Values, []input.Violation) []input.Violation, others ...string) (render.Fields, url.Values, whatif.Options, error) {
	if c.Request().URL.RawQuery == "" {
		return render.All, nil, whatif.Options{Explore: explore}, nil
	}
	values, violations, err := parameters(c, append([]string{"fields", "samples", "what_if"}, others...)...)
	if err != nil {
		return 0, nil, whatif.Options{}, err
	}
	var q classifyQuery
	violations = append(violations, q.read(values)...)
	violations = append(violations, check(&q, values)...)
	if checkOthers != nil {
		violations = checkOthers(values, violations)
	}
	if len(violations) > 0 {
		return 0, nil, whatif.Options{}, violated(invalidQuery, "The query", violations)
	}
	only, err := render.ParseFields(q.Fields)
	if err != nil {
		return 0, nil, whatif.Options{}, problem(invalidQuery, "The answer has no such member.")
	}
	o := q.options(explore)
	o.Explore = o.Explore && only.Explored()
	return only, values, o, nil
}

// options is what the parameters ask about a case; explore is what holds where
// they do not say.
func (q *classifyQuery) options(explore bool) whatif.Options {
	o := whatif.Options{Explore: explore}
	if q.WhatIf != nil {
		o.Explore = *q.WhatIf == "true"
	}
	if q.Samples != nil {
		o.Samples = *q.Samples
	}
	return o
}

// read reads the parameters as they stand; what is no number is a violation.
func (q *classifyQuery) read(values url.Values) []input.Violation {
	if values.Has("fields") {
		q.Fields = strings.Split(values.Get("fields"), ",")
	}
	if values.Has("what_if") {
		text := values.Get("what_if")
		q.WhatIf = &text
	}
	if !values.Has("samples") {
		return nil
	}
	text := values.Get("samples")
	n, err := strconv.Atoi(text)
	if err != nil {
		var bad input.Violations
		bad.Add("/samples", input.WrongType, fmt.Sprintf("samples is a whole number from %d to %d.", whatif.MinSamples, whatif.MaxSamples), jsonString(text))
		return bad.List()
	}
	q.Samples = &n
	return nil
}

// noParameters refuses every parameter.
func noParameters(c echo.Context) error {
	if c.Request().URL.RawQuery == "" {
		return nil
	}
	_, violations, err := parameters(c)
	if err != nil {
		return err
	}
	if len(violations) > 0 {
		return violated(invalidQuery, "The query", violations)
	}
	return nil
}

// parameters takes the query apart. A name that is not known, or that is given
// twice, is a violation.
func parameters(c echo.Context, known ...string) (url.Values, []input.Violation, error) {
	values, err := url.ParseQuery(c.Request().URL.RawQuery)
	if err != nil {
		return nil, nil, problem(badRequest, "The query is not encoded as a URL wants it.")
	}
	var bad input.Violations
	for name, list := range values {
		pointer := "/" + escapePointer(name)
		switch {
		case !slices.Contains(known, name):
			bad.Add(pointer, input.UnknownField, unknownParameter(name, known), jsonString(list[0]))
		case len(list) > 1:
			bad.Add(pointer, input.Duplicate, fmt.Sprintf("%s is given %d times.", name, len(list)), jsonString(list[1]))
		}
	}
	return values, bad.List(), nil
}

func unknownParameter(name string, known []string) string {
	switch near := input.Nearest(name, known); {
	case len(known) == 0:
		return "This path takes no parameters."
	case len(near) > 0:
		return fmt.Sprintf("No parameter is called %s. Did you mean %s?", quoted(name), strings.Join(near, " or "))
	}
	return fmt.Sprintf("No parameter is called %s; known are %s.", quoted(name), strings.Join(known, ", "))
}

// check validates the parameters in a struct.
func check(q any, values url.Values) []input.Violation {
	err := validate.Struct(q)
	var failures validator.ValidationErrors
	if !errors.As(err, &failures) {
		return nil
	}
	var bad input.Violations
	for _, f := range failures {
		name, _, _ := strings.Cut(f.Field(), "[") // "fields[2]" is the third of a list in one parameter
		value, isText := f.Value().(string)
		if !isText {
			value = values.Get(name)
		}
		bad.Add("/"+name, codeOf(f.Tag()), sentenceOf(name, f.Tag(), f.Param(), value), jsonString(value))
	}
	return bad.List()
}

func codeOf(tag string) input.Code {
	switch tag {
	case "member", "oneof":
		return input.UnknownChoice
	}
	return input.OutOfRange
}

func sentenceOf(name, tag, bound, value string) string {
	switch tag {
	case "member":
		_, err := render.ParseFields([]string{value})
		return err.Error()
	case "required":
		return name + " has an empty element."
	case "gte":
		return name + " must be at least " + bound + "."
	case "lte":
		return name + " must be at most " + bound + "."
	case "oneof":
		return name + " is " + strings.ReplaceAll(bound, " ", " or ") + "."
	}
	return fmt.Sprintf("%s is too long: at most %s are read.", name, bound)
}
