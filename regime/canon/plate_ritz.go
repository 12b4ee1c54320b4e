package canon

import (
	"cmp"
	"math"
	"slices"

	"gonum.org/v1/gonum/mat"
)

// plateBasis are polynomials over 0 ≤ x ≤ 1 that satisfy the geometric conditions
// of two ends and are orthonormal: (x)^p (1−x)^q times Jacobi polynomials, p and
// q = 0 at a free end, 1 at a simply supported one, 2 at a clamped one. With them
// come the integrals that the energy of a plate needs.
type plateBasis struct {
	size             int
	bend, slope, mix *mat.Dense // ∫ψᵢ″ψⱼ″, ∫ψᵢ′ψⱼ′, ∫ψᵢ″ψⱼ
	beam             []float64  // ∫ψᵢφ with a beam's mode shape φ, if asked for
}

// plateParity selects polynomials by their symmetry about the middle, for ends
// that are alike.
type plateParity int

const (
	allParities plateParity = iota
	evenParity
	oddParity
)

func endExponent(edge byte) int {
	switch edge {
	case 'C':
		return 2
	case 'S':
		return 1
	}
	return 0
}

// newPlateBasis builds size polynomials for the ends and, with beam not nil, their
// products with its shape.
func newPlateBasis(left, right byte, parity plateParity, size int, beam *beamFunction) *plateBasis {
	p, q := endExponent(left), endExponent(right)
	first, stride := 0, 1
	if parity != allParities {
		stride = 2
	}
	if parity == oddParity {
		first = 1
	}
	degree := first + stride*(size-1) + p + q
	nodes := degree + 2
	if beam != nil {
		nodes += 8 + int(beam.β)/2
	}
	rule := legendreRuleFor(nodes)

	b := &plateBasis{size: size, bend: mat.NewDense(size, size, nil), slope: mat.NewDense(size, size, nil), mix: mat.NewDense(size, size, nil)}
	if beam != nil {
		b.beam = make([]float64, size)
	}
	values := make([][3]float64, size)
	for k, x := range rule.x {
		evaluatePlateBasis(values, x, p, q, first, stride)
		b.accumulate(values, rule.w[k], x, beam)
	}
	return b
}

func (b *plateBasis) accumulate(values [][3]float64, weight, x float64, beam *beamFunction) {
	bend, slope, mix := b.bend.RawMatrix().Data, b.slope.RawMatrix().Data, b.mix.RawMatrix().Data
	for i, u := range values {
		row := i * b.size
		for j, v := range values {
			bend[row+j] += weight * u[2] * v[2]
			slope[row+j] += weight * u[1] * v[1]
			mix[row+j] += weight * u[2] * v[0]
		}
	}
	if beam == nil {
		return
	}
	φ := weight * beam.derivative(0, x)
	for i, u := range values {
		b.beam[i] += φ * u[0]
	}
}

// evaluatePlateBasis fills in value, slope and second derivative of the
// polynomials at x.
func evaluatePlateBasis(values [][3]float64, x float64, p, q, first, stride int) {
	edge := edgeFactor(x, p, q)
	α, β := 2*q, 2*p
	z := 2*x - 1
	for i := range values {
		k := first + stride*i
		norm := 1 / math.Sqrt(plateJacobiSquare(k, α, β))
		// d/dz P_k^(α,β) = ½(k + α + β + 1) P_(k−1)^(α+1,β+1), and dz/dx = 2.
		s := float64(k + α + β + 1)
		j0 := plateJacobi(k, α, β, z)
		j1 := s * plateJacobi(k-1, α+1, β+1, z)
		j2 := s * (s + 1) * plateJacobi(k-2, α+2, β+2, z)
		values[i] = [3]float64{
			norm * edge[0] * j0,
			norm * (edge[1]*j0 + edge[0]*j1),
			norm * (edge[2]*j0 + 2*edge[1]*j1 + edge[0]*j2),
		}
	}
}

// edgeFactor is x^p (1−x)^q with its first two derivatives.
func edgeFactor(x float64, p, q int) [3]float64 {
	a := powerDerivatives(x, p, 1)
	b := powerDerivatives(1-x, q, -1)
	return [3]float64{a[0] * b[0], a[1]*b[0] + a[0]*b[1], a[2]*b[0] + 2*a[1]*b[1] + a[0]*b[2]}
}

func powerDerivatives(x float64, p int, sign float64) [3]float64 {
	switch p {
	case 2:
		return [3]float64{x * x, sign * 2 * x, 2}
	case 1:
		return [3]float64{x, sign, 0}
	}
	return [3]float64{1, 0, 0}
}

// plateJacobi is the Jacobi polynomial P_k^(α,β)(z), zero for negative k.
func plateJacobi(k, α, β int, z float64) float64 {
	if k < 0 {
		return 0
	}
	a, b := float64(α), float64(β)
	before, p := 1.0, 0.5*(a-b)+0.5*(a+b+2)*z
	if k == 0 {
		return before
	}
	for i := 2; i <= k; i++ {
		n := float64(i)
		c := 2*n + a + b
		next := ((c-1)*(c*(c-2)*z+a*a-b*b)*p - 2*(n+a-1)*(n+b-1)*c*before) / (2 * n * (n + a + b) * (c - 2))
		before, p = p, next
	}
	return p
}

// plateJacobiSquare is ∫₀¹ x^β (1−x)^α P_k² dx, that is
// Γ(k+α+1)Γ(k+β+1)/((2k+α+β+1) Γ(k+α+β+1) k!) with the factorials divided out.
func plateJacobiSquare(k, α, β int) float64 {
	ratio := 1.0
	for i := 1; i <= α; i++ {
		ratio *= float64(k+i) / float64(k+β+i)
	}
	return ratio / float64(2*k+α+β+1)
}

// plateEnergy is the stiffness matrix of a plate with unit mass matrix: eigenvalues
// λ⁴. The energy is ∫w_xx² + s⁴w_yy² + 2νs² w_xx w_yy + 2(1−ν)s² w_xy².
func plateEnergy(x, y *plateBasis, aspect, nu float64) *mat.SymDense {
	size := x.size * y.size
	k := mat.NewSymDense(size, nil)
	data := k.RawSymmetric().Data
	s2 := aspect * aspect
	bendX, slopeX, mixX := x.bend.RawMatrix().Data, x.slope.RawMatrix().Data, x.mix.RawMatrix().Data
	bendY, slopeY, mixY := y.bend.RawMatrix().Data, y.slope.RawMatrix().Data, y.mix.RawMatrix().Data
	for i := range x.size {
		for k := range x.size {
			ik, ki := i*x.size+k, k*x.size+i
			for j := range y.size {
				row := (i*y.size + j) * size
				for l := range y.size {
					jl, lj := j*y.size+l, l*y.size+j
					v := s2 * (nu*(mixX[ik]*mixY[lj]+mixX[ki]*mixY[jl]) + 2*(1-nu)*slopeX[ik]*slopeY[jl])
					if j == l {
						v += bendX[ik]
					}
					if i == k {
						v += s2 * s2 * bendY[jl]
					}
					data[row+k*y.size+l] = v
				}
			}
		}
	}
	return k
}

// withoutLast is the stiffness without the last polynomial of each direction.
func withoutLast(k *mat.SymDense, sizeX, sizeY int) *mat.SymDense {
	nx, ny := max(sizeX-1, 1), max(sizeY-1, 1)
	r := mat.NewSymDense(nx*ny, nil)
	for i := range nx * ny {
		for j := i; j < nx*ny; j++ {
			r.SetSym(i, j, k.At(i/ny*sizeY+i%ny, j/ny*sizeY+j%ny))
		}
	}
	return r
}

// plateEigenvalues returns λ⁴ in rising order, and the vectors if they are wanted.
func plateEigenvalues(k *mat.SymDense, vectors bool) ([]float64, *mat.Dense) {
	var e mat.EigenSym
	if !e.Factorize(k, vectors) {
		return nil, nil
	}
	if !vectors {
		return e.Values(nil), nil
	}
	var v mat.Dense
	e.VectorsTo(&v)
	return e.Values(nil), &v
}

// twoLambdas are λ² of the smaller and of the larger set of polynomials.
type twoLambdas struct{ rough, fine float64 }

// plateModesOf returns all λ² of one class of symmetry but those of zero frequency.
func plateModesOf(x, y *plateBasis, aspect, nu float64) []twoLambdas {
	k := plateEnergy(x, y, aspect, nu)
	fine, _ := plateEigenvalues(k, false)
	rough, _ := plateEigenvalues(withoutLast(k, x.size, y.size), false)
	var modes []twoLambdas
	for i := range min(len(fine), len(rough)) {
		// A motion without strain comes out as rounding, of either sign; the lowest
		// λ⁴ of any plate that strains is above 10·min(1, s⁴).
		if fine[i] > math.Min(1, math.Pow(aspect, 4)) {
			modes = append(modes, twoLambdas{math.Sqrt(rough[i]), math.Sqrt(fine[i])})
		}
	}
	return modes
}

// paritiesOf lists the classes of symmetry of a pair of ends.
func paritiesOf(left, right byte) []plateParity {
	if left == right {
		return []plateParity{evenParity, oddParity}
	}
	return []plateParity{allParities}
}

// parityOf is the class in which the mode of n half waves lies.
func parityOf(left, right byte, n int) plateParity {
	if left != right {
		return allParities
	}
	if n%2 == 1 {
		return evenParity
	}
	return oddParity
}

// polynomialsFor is the number of polynomials of one class for n half waves: a
// polynomial resolves π/2 per degree at most, and a margin makes the digits.
func polynomialsFor(parity plateParity, n int) int {
	if parity == allParities {
		return 6 + int(math.Ceil(1.6*float64(n)))
	}
	return 5 + int(math.Ceil(0.8*float64(n)))
}

// rankPlateModes is the mth of all modes of a plate with free edges. About √(ms)
// half waves lie along x and √(m/s) along y, none of them more than m.
func rankPlateModes(k plateKey) (rough, fine float64) {
	var all []twoLambdas
	along := func(s float64) int { return min(k.m, 1+int(math.Ceil(math.Sqrt(float64(k.m)*s)))) }
	mx, my := along(k.aspect), along(1/k.aspect)
	// A clamped or free short edge makes a layer as wide as that edge is long.
	switch {
	case k.aspect > 3:
		mx, my = mx+4, max(my-2, 0)
	case k.aspect < 1.0/3:
		mx, my = max(mx-2, 0), my+4
	}
	for _, px := range paritiesOf(k.edges[0], k.edges[2]) {
		x := newPlateBasis(k.edges[0], k.edges[2], px, polynomialsFor(px, mx), nil)
		for _, py := range paritiesOf(k.edges[1], k.edges[3]) {
			y := newPlateBasis(k.edges[1], k.edges[3], py, polynomialsFor(py, my), nil)
			all = append(all, plateModesOf(x, y, k.aspect, k.nu)...)
		}
	}
	slices.SortFunc(all, func(a, b twoLambdas) int { return cmp.Compare(a.fine, b.fine) })
	mode := all[k.m-1]
	return mode.rough, mode.fine
}

// solveSinePlate is the plate with a sine of m half waves along x, for which the
// energy leaves one direction only: ∫ψ″ψ″ = (mπ)⁴, ∫ψ′ψ′ = −∫ψ″ψ = (mπ)².
func solveSinePlate(k plateKey) (rough, fine float64) {
	μ2 := math.Pow(float64(k.m)*math.Pi, 2)
	x := &plateBasis{
		size:  1,
		bend:  mat.NewDense(1, 1, []float64{μ2 * μ2}),
		slope: mat.NewDense(1, 1, []float64{μ2}),
		mix:   mat.NewDense(1, 1, []float64{-μ2}),
	}
	// A narrow plate's edge layers, of the length of a half wave along x, need
	// more polynomials.
	size := 2*k.n + 8 + int(1.5*float64(k.m)/k.aspect)
	y := newPlateBasis(k.edges[1], k.edges[3], allParities, min(size, 40), nil)
	mode := plateModesOf(x, y, k.aspect, k.nu)[k.n-1]
	return mode.rough, mode.fine
}

// solveHeldPlate is the plate without a free edge: its mode (m, n) is the one in
// which the product of the beam's modes m and n weighs most. The smaller set is
// the same mode with its last polynomials struck out, which can only overstate
// what they do.
func solveHeldPlate(k plateKey) (rough, fine float64) {
	wavesX, wavesY := k.m, k.n
	if k.aspect > 0.7 && k.aspect < 1.4 { // (n, m) may mix in
		wavesX = max(k.m, k.n)
		wavesY = wavesX
	}
	x := heldBasis(k.edges[0], k.edges[2], k.m, wavesX)
	y := heldBasis(k.edges[1], k.edges[3], k.n, wavesY)
	energy := plateEnergy(x, y, k.aspect, k.nu)
	product := beamProduct(x, y)
	mode, ok := modeNearProduct(energy, product)
	if !ok {
		// The shorter side makes the more half waves along it the costlier.
		mode = heaviestMode(energy, product, (k.m > k.n) == (k.aspect >= 1))
	}
	fine = math.Sqrt(rayleighQuotient(energy, mode))
	for i := range x.size {
		mode.SetVec(i*y.size+y.size-1, 0)
	}
	for j := range y.size {
		mode.SetVec((x.size-1)*y.size+j, 0)
	}
	return math.Sqrt(rayleighQuotient(energy, mode)), fine
}

// beamProduct is the product of the two beam modes in the plate's polynomials.
func beamProduct(x, y *plateBasis) *mat.VecDense {
	p := mat.NewVecDense(x.size*y.size, nil)
	for i, a := range x.beam {
		for j, b := range y.beam {
			p.SetVec(i*y.size+j, a*b)
		}
	}
	return p
}

func rayleighQuotient(k *mat.SymDense, v *mat.VecDense) float64 {
	return mat.Inner(v, k, v) / mat.Dot(v, v)
}

// modeNearProduct finds the mode next to the product in frequency by inverse
// iteration. It is the right one for certain if more than half of the product
// lies in it; else, or without convergence, it is not ok.
func modeNearProduct(k *mat.SymDense, product *mat.VecDense) (mode *mat.VecDense, ok bool) {
	size := product.Len()
	shift := rayleighQuotient(k, product)
	shifted := mat.NewDense(size, size, nil)
	shifted.Copy(k)
	for i := range size {
		shifted.Set(i, i, shifted.At(i, i)-shift)
	}
	var lu mat.LU
	lu.Factorize(shifted)
	mode = mat.VecDenseCopyOf(product)
	last := shift
	for range 40 {
		var next mat.VecDense
		// A shift that hits the frequency makes a huge vector of the right direction.
		if err := lu.SolveVecTo(&next, false, mode); err != nil && !isNearSingular(err) {
			return nil, false
		}
		next.ScaleVec(1/mat.Norm(&next, 2), &next)
		mode = &next
		λ4 := rayleighQuotient(k, mode)
		if math.Abs(λ4-last) < 1e-14*λ4 {
			part := mat.Dot(mode, product)
			return mode, part*part > 0.6*mat.Dot(product, product)
		}
		last = λ4
	}
	return nil, false
}

func isNearSingular(err error) bool {
	c, ok := err.(mat.Condition)
	return ok && !math.IsInf(float64(c), 0)
}

// heldSupport is the support of a beam between two edges, neither of them free.
func heldSupport(left, right byte) BeamSupport {
	switch {
	case left != right:
		return ClampedPinned
	case left == 'C':
		return ClampedClamped
	}
	return PinnedPinned
}

// heldBasis resolves so many half waves and projects the beam mode n on them.
func heldBasis(left, right byte, n, waves int) *plateBasis {
	support := heldSupport(left, right)
	if support == ClampedPinned && left == 'S' {
		left, right = right, left // a reflection changes no energy
	}
	beam := newBeamFunction(support, n)
	parity := parityOf(left, right, n)
	return newPlateBasis(left, right, parity, polynomialsFor(parity, waves), &beam)
}

// heaviestMode is the mode with the largest part of the beam product, out of all.
// The two modes of a square plate that mix (m, n) with (n, m) have equal parts: the
// lower is given if lower is set, and the higher if not.
func heaviestMode(k *mat.SymDense, product *mat.VecDense, lower bool) *mat.VecDense {
	_, vectors := plateEigenvalues(k, true)
	if vectors == nil { // no convergence, which a finite symmetric matrix does not show
		return product
	}
	weights := mat.NewVecDense(product.Len(), nil)
	weights.MulVec(vectors.T(), product)
	weights.MulElemVec(weights, weights)
	best := 0
	for mode := range weights.Len() {
		if weights.AtVec(mode) > weights.AtVec(best) {
			best = mode
		}
	}
	chosen := best
	for mode := range weights.Len() {
		tie := mode != best && weights.AtVec(mode) > 0.98*weights.AtVec(best)
		if tie && lower == (mode < best) {
			chosen = mode
		}
	}
	return mat.VecDenseCopyOf(vectors.ColView(chosen))
}
