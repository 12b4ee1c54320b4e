package kind

import (
	"math"
	"testing"

	"regimed/regime/canon"
)

// The share of a disc's first mode that changes a volume: the clamped shape
// (1 − r²)² gives 5/9, the exact mode, which is steeper, a little less; and the radiation at
// low frequency, r̂ = (k₀a)²·share/2, is that of the baffled disc.
func TestVolumeShareOfADisc(t *testing.T) {
	p := &plate{circular: true, a: 1, m: 1, n: 1, disc: canon.CircularClamped}
	p.discMode(0.3)
	if share := p.volumeShare(); share > 5.0/9 || share < 0.95*5.0/9 {
		t.Errorf("share %g of a clamped disc, want a little less than 5/9", share)
	}
	const k0a = 0.05
	_, resistance, err := canon.BaffledCircularPlateMode(p.disc, 0, 0, 0.3, k0a)
	if err != nil {
		t.Fatal(err)
	}
	if got, want := p.volumeShare(), 2*resistance/(k0a*k0a); math.Abs(got/want-1) > 1e-3 {
		t.Errorf("share %g, from the radiation %g", got, want)
	}
}

// A round film has the squeeze number of the square of its area.
func TestRoundFilmCountsAsASquare(t *testing.T) {
	round := &plate{circular: true, a: 1, b: 1}
	square := &plate{a: math.Sqrt(math.Pi), b: math.Sqrt(math.Pi)}
	if math.Abs(round.filmArea()/square.filmArea()-1) > 1e-12 || round.filmAspect() != square.filmAspect() {
		t.Errorf("area %g and %g", round.filmArea(), square.filmArea())
	}
}
