package render

import (
	"regimed/regime/assumption"
	"regimed/regime/group"
	"regimed/regime/scale"
)

// Heads are the members of scales, groups and findings that are the same in
// every answer, written once: the name and the opening brace with them.
var (
	scaleHeads = func() (heads [scale.Count]string) {
		for id := range scale.Count {
			d := scale.Of(id)
			heads[id] = head(d.ID, "symbol", d.Symbol, "title", d.Title)
		}
		return heads
	}()
	groupHeads = func() (heads [group.Count]string) {
		for id := range group.Count {
			d := group.Of(id)
			heads[id] = head(d.ID, "symbol", d.Symbol, "title", d.Title, "definition", d.Definition)
		}
		return heads
	}()
	findingHeads = func() (heads []string) {
		for _, e := range assumption.Catalogue {
			heads = append(heads, head(e.ID, "title", e.Title, "leaves_out", e.LeavesOut))
		}
		return heads
	}()
)

// head writes the name of a member and the beginning of its object.
func head(id string, pairs ...string) string {
	dst := append(text(nil, id), ':', '{')
	for i := 0; i < len(pairs); i += 2 {
		dst = member(dst, pairs[i], pairs[i+1])
	}
	return string(dst)
}
