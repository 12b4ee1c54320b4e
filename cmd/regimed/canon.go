package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"math"
	"os"
	"slices"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"regimed/api"
	"regimed/api/render/canonplot"
	"regimed/regime/canon"
)

func newCanon() *cobra.Command {
	return &cobra.Command{
		Use:   "canon NAME [ARGUMENT...] [--argument VALUE...]",
		Short: "Evaluate a canonical solution",
		Long: `Evaluates a solved problem, by which simplifications are priced. Its arguments
are dimensionless numbers and choices by name; they come in the order of
"regimed catalog canon", or as flags with their names. What is left out takes
its default, where it has one. Negative numbers need no special care.

Prints one line of JSON with all digits; null is a value that is unbounded.

With --plot FILE it also draws the solution over its range, or the readable part
of it, into a .svg or .png: one curve for each value, known limits dashed. What it
is drawn over need not be given, and is marked if it is; "regimed canon NAME
--help" names it. What else is missing takes a usual value, which the picture
names. Without all it needs for a line of JSON it prints the name of the file.`,
		Example: `  regimed canon OscillatingCylinder 36
  regimed canon CylinderInShell 1000 1.1
  regimed canon ConveyingPipe --support cantilever --beta 0.2
  regimed canon ConveyingPipe 0.2 -5
  regimed canon Theodorsen --plot lift.svg
  regimed canon CylinderInShell --q 1.1 --plot gap.png`,
		DisableFlagParsing: true, // a negative number is no flag
		ValidArgsFunction:  completeCanon,
		RunE: func(cmd *cobra.Command, args []string) error {
			if len(args) == 0 {
				return &usageError{fmt.Errorf("which canonical solution? %q lists them", "regimed catalog canon")}
			}
			if args[0] == "-h" || args[0] == "--help" {
				return cmd.Help()
			}
			entry := canon.Find(args[0])
			if entry == nil {
				return fmt.Errorf("no canonical solution is called %q.%s", args[0], didYouMean(args[0], canonNames()))
			}
			if slices.Contains(args[1:], "--help") || slices.Contains(args[1:], "-h") {
				return describe(cmd.OutOrStdout(), entry)
			}
			words, file, err := plotFile(args[1:])
			if err != nil {
				return &usageError{err}
			}
			if file != "" {
				return plotCanon(cmd.OutOrStdout(), entry, words, file)
			}
			line, err := evaluate(entry, words)
			if err != nil {
				return err
			}
			_, err = cmd.OutOrStdout().Write(line)
			return err
		},
	}
}

// describe prints what a canonical solution is, and its arguments with their
// ranges.
func describe(out io.Writer, entry *canon.Entry) error {
	var b strings.Builder
	fmt.Fprintf(&b, "%s %s\n\n%s\n\n  %s\n\nArguments\n", entry.Name, signature(entry), entry.Problem, entry.Equation)
	for i := range entry.Args {
		a := &entry.Args[i]
		fmt.Fprintf(&b, "  %s  %s: %s\n", a.Name, a.Doc, allowed(a))
	}
	b.WriteString("\nValues\n")
	for _, o := range entry.Outputs {
		fmt.Fprintf(&b, "  %s  %s: %s\n", o.ID, o.Symbol, o.Doc)
	}
	fmt.Fprintf(&b, "\nRelative accuracy %g.\n", entry.Accuracy)
	over := &entry.Args[entry.Sweep()]
	from, to := over.Window()
	fmt.Fprintf(&b, "Drawn over %s from %g to %g by --plot FILE.\n", over.Name, from, to)
	if entry.Note != "" {
		fmt.Fprintf(&b, "%s\n", entry.Note)
	}
	for _, s := range entry.Sources {
		fmt.Fprintf(&b, "Source: %s\n", s.Full)
	}
	_, err := io.WriteString(out, b.String())
	return err
}

// allowed says what an argument may be, and what it is when left out.
func allowed(a *canon.Arg) string {
	if len(a.Choices) > 0 {
		s := "one of " + strings.Join(a.Choices, ", ")
		if a.Optional {
			s += "; else " + a.Choices[int(a.Default)]
		}
		return s
	}
	s := bounds(a.Min, a.Max)
	if a.Optional {
		s += fmt.Sprintf("; else %g", a.Default)
	}
	return s
}

// endless is from where on a bound stands for none.
const endless = 1e300

func bounds(least, most float64) string {
	switch {
	case least <= -endless && most >= endless:
		return "any number"
	case least <= -endless:
		return fmt.Sprintf("up to %g", most)
	case most >= endless:
		return fmt.Sprintf("from %g on", least)
	}
	return fmt.Sprintf("%g to %g", least, most)
}

// evaluate evaluates a canonical solution, and writes it as the service does.
func evaluate(entry *canon.Entry, words []string) ([]byte, error) {
	args, err := canonArguments(entry, words)
	if err != nil {
		return nil, err
	}
	values, err := entry.Evaluate(args)
	if err != nil {
		return nil, err
	}
	return appendRecord(nil, canonResult(entry, args, values))
}

// plotFile takes --plot FILE out of the words; it has to stand before a lone --.
func plotFile(words []string) (rest []string, file string, err error) {
	for i := 0; i < len(words); i++ {
		value, whole := strings.CutPrefix(words[i], "--plot=")
		switch {
		case words[i] == "--":
			return append(rest, words[i:]...), file, nil
		case words[i] != "--plot" && !whole:
			rest = append(rest, words[i])
			continue
		case file != "":
			return nil, "", errors.New("--plot is given twice")
		}
		if !whole {
			if i++; i == len(words) {
				return nil, "", errors.New("--plot needs the name of a file")
			}
			value = words[i]
		}
		if _, err := canonplot.FormatOf(value); err != nil {
			return nil, "", err
		}
		file = value
	}
	return rest, file, nil
}

// plotCanon draws a solution into a file, and prints its values if all that they
// need is given, or else the name of the file.
func plotCanon(out io.Writer, entry *canon.Entry, words []string, file string) error {
	args, missing, err := someArguments(entry, words)
	if err != nil {
		return err
	}
	said := []byte(file + "\n")
	if missing == nil {
		values, err := entry.Evaluate(args)
		if err != nil {
			return err
		}
		if said, err = appendRecord(nil, canonResult(entry, args, values)); err != nil {
			return err
		}
	}
	format, err := canonplot.FormatOf(file)
	if err != nil {
		return err
	}
	var picture bytes.Buffer
	if err := canonplot.Draw(&picture, format, entry, args); err != nil {
		return err
	}
	if err := os.WriteFile(file, picture.Bytes(), 0o666); err != nil {
		return err
	}
	_, err = out.Write(said)
	return err
}

// canonResult makes the record of an evaluation: choices by name, and null for
// a value that is not finite.
func canonResult(entry *canon.Entry, args, values []float64) api.CanonResult {
	r := api.CanonResult{Name: entry.Name}
	for i := range entry.Args {
		a, x := &entry.Args[i], args[i]
		if math.IsNaN(x) {
			x = a.Default
		}
		var value any = x
		if len(a.Choices) > 0 {
			value = a.Choices[int(x)]
		}
		r.Arguments = append(r.Arguments, api.Member{Name: a.Name, Value: value})
	}
	for i, x := range values {
		v := api.CanonValue{ID: entry.Outputs[i].ID}
		if !math.IsInf(x, 0) && !math.IsNaN(x) {
			v.Value = &x
		}
		r.Values = append(r.Values, v)
	}
	return r
}

func canonNames() []string {
	var names []string
	for _, e := range canon.All() {
		names = append(names, e.Name)
	}
	return names
}

// canonArguments reads flags by name, and gives what is left over to the other
// arguments in their order. What is not given is NaN, for which Evaluate takes
// the default.
func canonArguments(entry *canon.Entry, words []string) ([]float64, error) {
	args, missing, err := someArguments(entry, words)
	if err == nil && missing != nil {
		err = fmt.Errorf("%s: the argument %s is missing; it takes %s", entry.Name, missing.Name, signature(entry))
	}
	return args, err
}

// someArguments is canonArguments for a case in which some may be missing; it
// returns the first that is, and has no default.
func someArguments(entry *canon.Entry, words []string) (args []float64, missing *canon.Arg, err error) {
	named, positional, err := splitWords(entry, words)
	if err != nil {
		return nil, nil, err
	}
	args = make([]float64, len(entry.Args))
	for i := range entry.Args {
		a := &entry.Args[i]
		word, given := named[a.Name]
		if !given && len(positional) > 0 {
			word, given, positional = positional[0], true, positional[1:]
		}
		switch {
		case given:
			if args[i], err = canonValue(entry, a, word); err != nil {
				return nil, nil, err
			}
			continue
		case !a.Optional && missing == nil:
			missing = a
		}
		args[i] = math.NaN()
	}
	if len(positional) > 0 {
		return nil, nil, fmt.Errorf("%s: %q is one argument too many; it takes %s", entry.Name, positional[0], signature(entry))
	}
	return args, missing, nil
}

// splitWords tells flags from positional arguments. Everything that does not
// begin with two dashes is a value, so that -5 is a number.
func splitWords(entry *canon.Entry, words []string) (named map[string]string, positional []string, err error) {
	named = map[string]string{}
	for i := 0; i < len(words); i++ {
		if words[i] == "--" {
			return named, append(positional, words[i+1:]...), nil
		}
		flag, isFlag := strings.CutPrefix(words[i], "--")
		if !isFlag {
			positional = append(positional, words[i])
			continue
		}
		name, value, whole := strings.Cut(flag, "=")
		if !slices.Contains(argumentNames(entry), name) {
			return nil, nil, fmt.Errorf("%s has no argument %q; it takes %s", entry.Name, name, signature(entry))
		}
		if _, twice := named[name]; twice {
			return nil, nil, fmt.Errorf("%s: %s is given twice", entry.Name, name)
		}
		if !whole {
			if i++; i == len(words) {
				return nil, nil, fmt.Errorf("%s: --%s needs a value", entry.Name, name)
			}
			value = words[i]
		}
		named[name] = value
	}
	return named, positional, nil
}

func argumentNames(entry *canon.Entry) []string {
	var names []string
	for i := range entry.Args {
		names = append(names, entry.Args[i].Name)
	}
	return names
}

// signature lists the arguments in order, those with a default in brackets.
func signature(entry *canon.Entry) string {
	words := argumentNames(entry)
	for i := range words {
		if entry.Args[i].Optional {
			words[i] = "[" + words[i] + "]"
		}
	}
	return strings.Join(words, " ")
}

// canonValue reads a number, or a choice by name.
func canonValue(entry *canon.Entry, a *canon.Arg, word string) (float64, error) {
	if len(a.Choices) > 0 {
		i := slices.Index(a.Choices, word)
		if i < 0 {
			return 0, fmt.Errorf("%s: %s is one of %s, not %q", entry.Name, a.Name, strings.Join(a.Choices, ", "), word)
		}
		return float64(i), nil
	}
	x, err := strconv.ParseFloat(word, 64)
	if err != nil || math.IsNaN(x) || math.IsInf(x, 0) {
		return 0, fmt.Errorf("%s: %s is a number, not %q", entry.Name, a.Name, word)
	}
	return x, nil
}

// completeCanon completes names, then choices by name and flags.
func completeCanon(_ *cobra.Command, args []string, start string) ([]cobra.Completion, cobra.ShellCompDirective) {
	const none = cobra.ShellCompDirectiveNoFileComp
	if len(args) == 0 {
		return canonNames(), none
	}
	entry := canon.Find(args[0])
	if entry == nil {
		return nil, none
	}
	if args[len(args)-1] == "--plot" {
		return []cobra.Completion{"svg", "png"}, cobra.ShellCompDirectiveFilterFileExt
	}
	if a := awaited(entry, args[1:]); a != nil {
		return a.Choices, none
	}
	words := []string{"--plot"}
	for i := range entry.Args {
		words = append(words, "--"+entry.Args[i].Name)
		words = append(words, entry.Args[i].Choices...)
	}
	return slices.DeleteFunc(words, func(w string) bool { return !strings.HasPrefix(w, start) }), none
}

// awaited returns the argument whose flag stands last, without its value yet.
func awaited(entry *canon.Entry, words []string) *canon.Arg {
	if len(words) == 0 {
		return nil
	}
	for i := range entry.Args {
		if words[len(words)-1] == "--"+entry.Args[i].Name {
			return &entry.Args[i]
		}
	}
	return nil
}
