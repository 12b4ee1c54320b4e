package main

import (
	"bytes"
	"fmt"
	"slices"
	"strconv"
	"strings"
	"unicode/utf8"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
	"github.com/spf13/cobra"
	"go.yaml.in/yaml/v3"

	"regimed/api"
)

// listFormats are the forms of a list; the first is the default.
var listFormats = []string{"text", "json"}

func newCatalog() *cobra.Command {
	var format string
	cmd := &cobra.Command{
		Use:   "catalog [" + strings.Join(api.CatalogNames(), "|") + "] [ENTRY...]",
		Short: "List what the program knows",
		Long: `Lists a catalogue, or the catalogues themselves. Entries that are named are
printed in full. With --format json a catalogue is what the service sends.`,
		Example: `  regimed catalog
  regimed catalog assumptions
  regimed catalog kinds cylinder
  regimed catalog classes --format json`,
		Args:              cobra.ArbitraryArgs,
		ValidArgsFunction: completeCatalog,
		RunE: func(cmd *cobra.Command, args []string) error {
			if err := knownFormat(format, listFormats); err != nil {
				return err
			}
			out, err := catalog(format, args)
			if err != nil {
				return err
			}
			_, err = cmd.OutOrStdout().Write(out)
			return err
		},
	}
	cmd.Flags().StringVarP(&format, "format", "f", listFormats[0], "form of the list: text or json")
	completeFlag(cmd, "format", completeFrom(func() []string { return listFormats }))
	return cmd
}

// catalog writes the index, a catalogue, or some of its entries.
func catalog(format string, args []string) ([]byte, error) {
	if len(args) == 0 {
		return catalogIndex(format)
	}
	name, wanted := args[0], args[1:]
	records, err := catalogRecords(name)
	if err != nil {
		return nil, err
	}
	if len(wanted) > 0 {
		if records, err = pick(name, records, wanted); err != nil {
			return nil, err
		}
	}
	switch {
	case format == "json":
		return appendRecord(nil, api.CatalogPage{Name: name, Title: api.CatalogTitle(name), Count: len(records), Records: records})
	case len(wanted) > 0:
		return appendInFull(nil, records)
	default:
		return appendList(nil, records), nil
	}
}

func catalogIndex(format string) ([]byte, error) {
	var index api.CatalogIndex
	var rows [][]string
	for _, name := range api.CatalogNames() {
		records, err := catalogRecords(name)
		if err != nil {
			return nil, err
		}
		title, n := api.CatalogTitle(name), len(records)
		index.Catalogs = append(index.Catalogs, api.CatalogEntry{Name: name, Title: title, Count: n, Path: "/v1/catalog/" + name})
		rows = append(rows, []string{name, strconv.Itoa(n), title})
	}
	if format == "json" {
		return appendRecord(nil, index)
	}
	return appendTable(nil, rows), nil
}

// catalogRecords returns the entries of a catalogue as JSON objects.
func catalogRecords(name string) ([]jsontext.Value, error) {
	list, known := api.Catalog(name)
	if !known {
		return nil, fmt.Errorf("no catalogue is called %q; there are %s.%s", name, strings.Join(api.CatalogNames(), ", "), didYouMean(name, api.CatalogNames()))
	}
	data, err := json.Marshal(list)
	if err != nil {
		return nil, err
	}
	var records []jsontext.Value
	err = json.Unmarshal(data, &records)
	return records, err
}

// pick returns the entries that are named.
func pick(catalog string, records []jsontext.Value, wanted []string) ([]jsontext.Value, error) {
	keys := keysOf(records)
	var picked []jsontext.Value
	for _, key := range wanted {
		i := slices.Index(keys, key)
		if i < 0 {
			return nil, fmt.Errorf("the catalogue %s has no entry %q.%s", catalog, key, didYouMean(key, keys))
		}
		picked = append(picked, records[i])
	}
	return picked, nil
}

// An entry goes by its first member: id, name or symbol.
func keysOf(records []jsontext.Value) []string {
	keys := make([]string, len(records))
	for i, r := range records {
		keys[i] = members(r)[0].value
	}
	return keys
}

// titles are the members that say what an entry is, the best first.
var titles = []string{"title", "problem", "standard", "full", "name"}

// appendList appends a line for each entry: its key and what it is.
func appendList(dst []byte, records []jsontext.Value) []byte {
	var rows [][]string
	for _, r := range records {
		list := members(r)
		rows = append(rows, []string{list[0].value, titleOf(list[1:])})
	}
	return appendTable(dst, rows)
}

func titleOf(list []textMember) string {
	for _, t := range titles {
		for _, m := range list {
			if m.name == t {
				return m.value
			}
		}
	}
	return ""
}

// textMember is a member of an object whose value is a string.
type textMember struct{ name, value string }

// members lists the members of an object whose values are strings, in order.
func members(object jsontext.Value) []textMember {
	var list []textMember
	dec := jsontext.NewDecoder(bytes.NewReader(object))
	if _, err := dec.ReadToken(); err != nil {
		return nil
	}
	for dec.PeekKind() == '"' {
		name, err := dec.ReadToken()
		if err != nil {
			return list
		}
		m := textMember{name: name.String()}
		value, err := dec.ReadValue()
		if err != nil {
			return list
		}
		if value.Kind() == '"' && json.Unmarshal(value, &m.value) == nil {
			list = append(list, m)
		}
	}
	return list
}

// appendTable sets rows in columns; the last is as wide as it likes.
func appendTable(dst []byte, rows [][]string) []byte {
	var widths []int
	for _, row := range rows {
		for i, cell := range row {
			if i == len(widths) {
				widths = append(widths, 0)
			}
			widths[i] = max(widths[i], utf8.RuneCountInString(cell))
		}
	}
	for _, row := range rows {
		line := ""
		for i, cell := range row {
			line += cell + strings.Repeat(" ", widths[i]-utf8.RuneCountInString(cell)+2)
		}
		dst = append(append(dst, strings.TrimRight(line, " ")...), '\n')
	}
	return dst
}

// appendInFull appends entries as YAML documents, which people read with ease.
func appendInFull(dst []byte, records []jsontext.Value) ([]byte, error) {
	var b bytes.Buffer
	for i, r := range records {
		if i > 0 {
			b.WriteString("---\n")
		}
		var node yaml.Node
		if err := yaml.Unmarshal(r, &node); err != nil { // JSON is YAML
			return nil, err
		}
		loosen(&node)
		enc := yaml.NewEncoder(&b)
		enc.SetIndent(2)
		if err := enc.Encode(&node); err != nil {
			return nil, err
		}
		if err := enc.Close(); err != nil {
			return nil, err
		}
	}
	return append(dst, b.Bytes()...), nil
}

// loosen drops the braces and quotes of JSON where YAML needs none. Lists of
// plain values stay on one line.
func loosen(n *yaml.Node) {
	flat := n.Kind == yaml.SequenceNode && !slices.ContainsFunc(n.Content, func(c *yaml.Node) bool { return c.Kind != yaml.ScalarNode })
	if !flat {
		n.Style = 0
	}
	for _, c := range n.Content {
		loosen(c)
	}
}

// appendRecord appends a record as JSON, in the form in which the service sends it.
func appendRecord(dst []byte, record any) ([]byte, error) {
	data, err := json.Marshal(record, json.Deterministic(true))
	if err != nil {
		return nil, err
	}
	return append(append(dst, data...), '\n'), nil
}

// completeCatalog completes names of catalogues, then of entries.
func completeCatalog(_ *cobra.Command, args []string, _ string) ([]cobra.Completion, cobra.ShellCompDirective) {
	const none = cobra.ShellCompDirectiveNoFileComp
	if len(args) == 0 {
		return api.CatalogNames(), none
	}
	records, err := catalogRecords(args[0])
	if err != nil {
		return nil, none
	}
	return slices.DeleteFunc(keysOf(records), func(k string) bool { return slices.Contains(args[1:], k) }), none
}
