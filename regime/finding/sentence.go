package finding

import (
	"fmt"
	"strings"

	"regimed/regime/group"
)

// Sentence is a sentence with the places in it where numbers go. It is taken
// apart once, at start; a rendering puts the numbers in.
//
// Places: {e} the estimate, {limit} the limit, {u} the utilisation, {phi} the
// factor, and any group by its id; ":%" after the name asks for per cent.
type Sentence struct {
	Text     string
	Segments []Segment
}

// Segment is a piece of text followed by the number of a place.
type Segment struct {
	Text    string
	Place   Place
	Group   group.ID
	Percent bool
}

// Place says which number follows a piece of text.
type Place uint8

// The places.
const (
	None Place = iota
	Estimate
	Limit
	UtilisationPlace
	FactorPlace
	GroupValue
)

// Say takes a sentence apart. It panics on a place that does not exist: all
// sentences are package variables, so that any test finds it.
func Say(text string) *Sentence {
	s := &Sentence{Text: text}
	rest := text
	for {
		before, after, found := strings.Cut(rest, "{")
		if !found {
			s.Segments = append(s.Segments, Segment{Text: rest})
			return s
		}
		name, tail, closed := strings.Cut(after, "}")
		if !closed {
			panic("finding: unclosed place in " + text)
		}
		s.Segments = append(s.Segments, segment(before, name, text))
		rest = tail
	}
}

func segment(before, name, text string) Segment {
	g := Segment{Text: before}
	name, g.Percent = strings.CutSuffix(name, ":%")
	switch name {
	case "e":
		g.Place = Estimate
	case "limit":
		g.Place = Limit
	case "u":
		g.Place = UtilisationPlace
	case "phi":
		g.Place = FactorPlace
	default:
		id, ok := group.Find(name)
		if !ok {
			panic(fmt.Sprintf("finding: no place %q for %q", name, text))
		}
		g.Place, g.Group = GroupValue, id
	}
	return g
}
