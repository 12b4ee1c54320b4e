package render

import (
	"crypto/sha256"
	"encoding/hex"
	"hash"
	"strconv"
	"sync"

	"regimed/regime/assumption"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/ladder"
)

// Version is that of the engine. A release sets it when it is linked:
//
//	go build -ldflags "-X regimed/api/render.Version=1.2.3"
var Version = "0.1.0"

// Catalogue is the digest of the assumptions, classes, criteria and presets in force:
// two answers with the same digest were judged by the same rules.
func Catalogue() string { return catalogue() }

var catalogue = sync.OnceValue(func() string {
	h := newLedger()
	for _, e := range assumption.Catalogue {
		h.entry(e)
	}
	for i := range ladder.Classes {
		h.class(&ladder.Classes[i])
	}
	for _, c := range criterion.All {
		h.text("criterion", c.ID, c.Assumption, c.Field, c.Standard, c.Edition, c.Clause, c.Formula)
	}
	for i := range finding.Presets {
		p := &finding.Presets[i]
		h.text("preset", p.Name)
		h.number(p.Frequency, p.Load, p.Response)
	}
	return hex.EncodeToString(h.Sum(nil))
})

// ledger writes entries into a hash, each text with its length before it, so
// that no two catalogues read the same.
type ledger struct{ hash.Hash }

func newLedger() ledger { return ledger{sha256.New()} }

func (h ledger) text(list ...string) {
	for _, s := range list {
		h.Write(strconv.AppendInt(nil, int64(len(s)), 10))
		h.Write([]byte{':'})
		h.Write([]byte(s))
	}
}

func (h ledger) number(list ...float64) {
	for _, x := range list {
		h.text(strconv.FormatFloat(x, 'g', -1, 64))
	}
}

func (h ledger) entry(e *assumption.Entry) {
	h.text("assumption", e.ID, e.Title, e.LeavesOut, e.Estimated, e.Hazard)
	for _, m := range e.Measures {
		h.text(m.String())
	}
	for _, s := range e.Sources {
		h.text(s.ID)
	}
}

func (h ledger) class(c *ladder.Class) {
	h.text("class", c.ID, c.Title, c.Solves)
	h.number(float64(c.Rank), float64(c.Domain.States), float64(c.Domain.Needs), float64(c.Domain.Bars))
	h.text(c.Domain.Kinds...)
	h.text(strconv.FormatBool(c.Domain.Dry))
	for _, e := range c.RestsOn {
		h.text(e.ID)
	}
	for _, x := range ladder.AxisList {
		h.text(*x.Of(&c.Axes))
	}
}
