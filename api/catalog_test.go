package api

import (
	"net/http"
	"reflect"
	"slices"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"

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

// Each catalogue holds as many records as the engine has entries.
func TestCatalogsAreWhole(t *testing.T) {
	want := map[string]int{
		"kinds": len(kind.All), "groups": int(group.Count), "assumptions": len(assumption.Catalogue), "classes": len(ladder.Classes),
		"criteria": len(criterion.All), "fluids": len(fluid.All()), "solids": len(solid.All()), "units": len(units.Table()),
		"sources": len(cite.All()), "canon": len(canon.All()),
	}
	for _, name := range CatalogNames() {
		list, ok := Catalog(name)
		if !ok || CatalogTitle(name) == "" {
			t.Fatalf("%s is missing", name)
		}
		if n := reflect.ValueOf(list).Len(); n != want[name] || n == 0 {
			t.Errorf("%s: %d records, wanted %d", name, n, want[name])
		}
		var page struct {
			Name, Title string
			Count       int
			Records     []map[string]any
		}
		if err := json.Unmarshal(bodyOf(t, call(t, http.MethodGet, "/v1/catalog/"+name, "")), &page, json.MatchCaseInsensitiveNames(true)); err != nil {
			t.Fatal(err)
		}
		if page.Name != name || page.Count != len(page.Records) || page.Count != want[name] {
			t.Errorf("%s: count %d, %d records", name, page.Count, len(page.Records))
		}
		checkIDs(t, name, page.Records)
	}
	if len(want) != len(CatalogNames()) {
		t.Errorf("%d catalogues", len(CatalogNames()))
	}
	if _, ok := Catalog("nothing"); ok || CatalogTitle("nothing") != "" {
		t.Error("a catalogue of nothing")
	}
}

// checkIDs checks that the records of a catalogue have names of their own.
func checkIDs(t *testing.T, name string, records []map[string]any) {
	t.Helper()
	seen := map[string]bool{}
	for i, r := range records {
		id := ""
		for _, key := range []string{"id", "name", "symbol"} {
			if s, ok := r[key].(string); ok && s != "" {
				id = s
				break
			}
		}
		if name == "units" {
			id, _ = r["symbol"].(string)
		}
		if id == "" || seen[id] {
			t.Errorf("%s: record %d has no name of its own: %q", name, i, id)
		}
		seen[id] = true
	}
}

// What one catalogue says of another is there.
func TestCatalogsAgree(t *testing.T) {
	sources, assumptions := map[string]bool{}, map[string]bool{}
	for _, s := range cite.All() {
		sources[s.ID] = true
	}
	for _, e := range assumption.Catalogue {
		assumptions[e.ID] = true
	}
	ran := 0
	check := func(where string, known map[string]bool, ids ...string) {
		for _, id := range ids {
			if ran++; !known[id] {
				t.Errorf("%s names %q, which is not there", where, id)
			}
		}
	}
	for _, e := range assumption.Catalogue {
		check(e.ID, sources, assumptionRecord(e).Sources...)
	}
	for _, c := range classes() {
		check(c.ID, assumptions, classRecord(c).RestsOn...)
	}
	for _, c := range criterion.All {
		check(c.ID, sources, criterionRecord(c).Source)
		check(c.ID, assumptions, c.Assumption)
	}
	for _, m := range fluid.All() {
		check(m.Name, sources, fluidRecord(m).Sources...)
	}
	for _, m := range solid.All() {
		check(m.Name, sources, solidRecord(m).Sources...)
	}
	for _, e := range canon.All() {
		check(e.Name, sources, canonRecord(e).Sources...)
	}
	if ran < 150 {
		t.Errorf("%d references", ran)
	}
}

// Every trait that a class asks for has a name, and names are unique.
func TestTraitsHaveNames(t *testing.T) {
	var named group.Traits
	seen := map[string]bool{}
	for _, x := range group.TraitNames {
		if named.Any(x.Trait) || seen[x.Name] {
			t.Errorf("%s twice", x.Name)
		}
		named |= x.Trait
		seen[x.Name] = true
	}
	for _, c := range classes() {
		if d := c.Domain; (d.States|d.Needs|d.Bars)&^named != 0 {
			t.Errorf("%s asks for a trait without a name", c.ID)
		}
	}
	r := classRecord(ladder.Find("added-mass"))
	if !slices.Contains(r.Domain.States, "still") || slices.Contains(r.Domain.Bars, "still") {
		t.Errorf("%+v", r.Domain)
	}
}

func TestKindRecords(t *testing.T) {
	list, _ := Catalog("kinds")
	for _, k := range list.([]KindRecord) {
		if k.Title == "" || k.Doc == "" || len(k.Fields) == 0 {
			t.Errorf("%s: %+v", k.Name, k)
		}
		for _, f := range k.Fields {
			if !strings.HasPrefix(f.Pointer, "/structure/") || f.Doc == "" || f.Type == "" {
				t.Errorf("%s: %+v", k.Name, f)
			}
			if f.Type == "quantity" && (f.Unit == "" || f.Quantity == "") {
				t.Errorf("%s.%s has no unit", k.Name, f.Name)
			}
		}
	}
	for _, k := range list.([]KindRecord) {
		if k.Name != "cylinder" {
			continue
		}
		d := k.Fields[slices.IndexFunc(k.Fields, func(f FieldRecord) bool { return f.Name == "diameter" })]
		if d.Unit != "m" || d.Rule != "greater than 0 m" || d.Quantity != "length" {
			t.Errorf("%+v", d)
		}
	}
}

// The records of fluids carry what the models give.
func TestFluidRecords(t *testing.T) {
	water := fluidRecord(fluid.Find("water"))
	if rho := *water.At.Density.Value; rho < 998 || rho > 998.4 || water.At.Density.Unit != "kg/m3" {
		t.Errorf("density of water %v %s", rho, water.At.Density.Unit)
	}
	if air := fluidRecord(fluid.Find("air")); air.At.SurfaceTension.Value != nil || air.Phase != "gas" {
		t.Errorf("%+v", air)
	}
}
