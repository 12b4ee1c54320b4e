package api

import (
	"reflect"

	"regimed/regime/assumption"
	"regimed/regime/canon"
	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/fluid"
	"regimed/regime/group"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/solid"
	"regimed/units"
)

// catalogs lists the catalogues in the order of the index. A new one is a line
// here and a path in openapi/openapi.yaml.
var catalogs = []struct {
	name, title string
	records     func() any
}{
	{"kinds", "structure kinds and their fields", func() any { return records(kind.All, kindRecord) }},
	{"groups", "dimensionless groups", func() any { return groupRecords() }},
	{"assumptions", "assumptions that a model may make, and how their error is estimated", func() any { return records(assumption.Catalogue, assumptionRecord) }},
	{"classes", "model classes, cheapest first", func() any { return records(classes(), classRecord) }},
	{"criteria", "criteria of standards that stand beside the physical model", func() any { return records(criterion.All, criterionRecord) }},
	{"fluids", "fluids by name", func() any { return records(fluid.All(), fluidRecord) }},
	{"solids", "solids by name, typical values", func() any { return records(solid.All(), solidRecord) }},
	{"units", "units and their factors to SI", func() any { return records(units.Table(), unitRecord) }},
	{"sources", "the bibliography", func() any { return cite.All() }},
	{"canon", "canonical solutions", func() any { return records(canon.All(), canonRecord) }},
}

// CatalogNames lists the names of the catalogues.
func CatalogNames() []string {
	var names []string
	for i := range catalogs {
		names = append(names, catalogs[i].name)
	}
	return names
}

// Catalog returns the records of a catalogue: a slice of structs with JSON
// tags, in the catalogue's own order.
func Catalog(name string) (any, bool) {
	for i := range catalogs {
		if catalogs[i].name == name {
			return catalogs[i].records(), true
		}
	}
	return nil, false
}

// CatalogTitle says what a catalogue holds; empty where there is none.
func CatalogTitle(name string) string {
	for i := range catalogs {
		if catalogs[i].name == name {
			return catalogs[i].title
		}
	}
	return ""
}

// records makes a record of each entry.
func records[E, R any](entries []E, record func(E) R) []R {
	list := make([]R, len(entries))
	for i, e := range entries {
		list[i] = record(e)
	}
	return list
}

func classes() []*ladder.Class {
	var list []*ladder.Class
	for i := range ladder.Classes {
		list = append(list, &ladder.Classes[i])
	}
	return list
}

func groupRecords() []GroupRecord {
	var list []GroupRecord
	for id := range group.Count {
		list = append(list, groupRecord(group.Of(id)))
	}
	return list
}

// CatalogPage is a catalogue as it is sent.
type CatalogPage struct {
	Name    string `json:"name"`
	Title   string `json:"title"`
	Count   int    `json:"count"`
	Records any    `json:"records"`
}

func catalogPage(name string) CatalogPage {
	list, _ := Catalog(name)
	return CatalogPage{Name: name, Title: CatalogTitle(name), Count: reflect.ValueOf(list).Len(), Records: list}
}

// CatalogIndex lists the catalogues.
type CatalogIndex struct {
	Catalogs []CatalogEntry `json:"catalogs"`
}

// CatalogEntry names one catalogue.
type CatalogEntry struct {
	Name  string `json:"name"`
	Title string `json:"title"`
	Count int    `json:"count"`
	Path  string `json:"path"`
}

func catalogIndex() CatalogIndex {
	var index CatalogIndex
	for _, name := range CatalogNames() {
		p := catalogPage(name)
		index.Catalogs = append(index.Catalogs, CatalogEntry{Name: name, Title: p.Title, Count: p.Count, Path: "/v1/catalog/" + name})
	}
	return index
}
