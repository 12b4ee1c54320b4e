package main

import (
	"regimed/api"
	"regimed/api/render"
	"regimed/regime/finding"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/scale"
)

type object = api.OrderedMembers

// schemas are the components that follow from lists of the engine.
func schemas() ([]byte, error) {
	list := object{
		{Name: "KindName", Value: names("Name of a structure kind.", kindNames())},
		{Name: "ClassName", Value: names("Id of a model class.", classNames())},
		{Name: "Verdict", Value: names("Outcome of one assumption.", finding.VerdictNames())},
		{Name: "Measure", Value: names("What goes wrong when an assumption is false.", finding.MeasureNames())},
		{Name: "Basis", Value: names("Where an estimate comes from.", basisNames())},
		{Name: "Origin", Value: names("Where a scale comes from.", originNames())},
		{Name: "AnswerMember", Value: names("A member of the answer.", render.FieldNames())},
		{Name: "Axes", Value: axes()},
	}
	return toYAML(append(list, api.CaseComponents()...))
}

func names(doc string, values []string) object {
	return object{{Name: "description", Value: doc}, {Name: "type", Value: "string"}, {Name: "enum", Value: values}}
}

func kindNames() []string {
	var list []string
	for _, k := range kind.All {
		list = append(list, k.Name)
	}
	return list
}

func classNames() []string {
	var list []string
	for i := range ladder.Classes {
		list = append(list, ladder.Classes[i].ID)
	}
	return list
}

func basisNames() []string {
	return []string{finding.Canonical.String(), finding.Threshold.String(), finding.Definition.String()}
}

func originNames() []string {
	var list []string
	for o := scale.Given; o <= scale.Assumed; o++ {
		list = append(list, o.String())
	}
	return list
}

// axes describes what a class stands for, axis by axis.
func axes() object {
	properties, required := object{}, []string{}
	for _, x := range ladder.AxisList {
		properties = append(properties, api.Member{Name: x.ID, Value: object{{Name: "type", Value: "string"}, {Name: "enum", Value: x.Values}}})
		required = append(required, x.ID)
	}
	return object{
		{Name: "title", Value: "Axes"},
		{Name: "description", Value: "What the class stands for, on the axes that pipelines branch on."},
		{Name: "type", Value: "object"},
		{Name: "properties", Value: properties},
		{Name: "required", Value: required},
	}
}
