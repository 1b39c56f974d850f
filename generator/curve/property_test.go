package curve

import (
	"math"
	"math/rand/v2"
	"testing"
)

// Random models of the sizes that the trade knows: resistivities of 1e-8 to
// 2e-6 Ω·m, α to ±7e-3 /K, β to ±1e-5 /K², γ to ±1e-8 /K³.
func randomPolynomial(random *rand.Rand) Polynomial {
	signed := func(most float64) float64 {
		if random.IntN(6) == 0 {
			return 0 // coefficients are often missing
		}
		return most * (2*random.Float64() - 1) * math.Pow(10, -4*random.Float64())
	}
	return Polynomial{
		Y0:    1e-8 * math.Pow(200, random.Float64()),
		Alpha: signed(7e-3), Beta: signed(1e-5), Gamma: signed(1e-8),
		Reference: c(-20 + 100*random.Float64()),
	}
}

func randomWindow(random *rand.Rand) (lo, hi float64) {
	lo = c(-200 + 200*random.Float64())
	return lo, lo + 1 + 800*random.Float64()
}

// randomCurve makes a curve of any kind.
func randomCurve(t *testing.T, random *rand.Rand) Curve {
	t.Helper()
	switch random.IntN(4) {
	case 0:
		x, y := randomTable(random)
		return must(t)(Table(x, y, random.IntN(2) == 0))
	case 1:
		lo := c(-200 + 150*random.Float64())
		return must(t)(platinum.Curve(lo, lo+10+600*random.Float64()))
	}
	lo, hi := randomWindow(random)
	return randomPolynomial(random).Curve(lo, hi)
}

func TestRereferenceThereAndBack(t *testing.T) {
	random := rand.New(rand.NewPCG(11, 1))
	for range 5000 {
		p := randomPolynomial(random)
		p.Reference = c(20)
		there := c(100 * random.Float64())
		if shape := p.shape(there - c(20)); shape < 0.2 {
			continue
		}
		back := p.Rereference(there).Rereference(c(20))
		near(t, "y₀", back.Y0/p.Y0, 1, 1e-13)
		near(t, "α", back.Alpha, p.Alpha, 1e-14)
		near(t, "β", back.Beta, p.Beta, 1e-16)
		near(t, "γ", back.Gamma, p.Gamma, 1e-19)
		k := c(-40 + 160*random.Float64())
		near(t, "the same curve", p.Rereference(there).At(k)/p.Y0, p.At(k)/p.Y0, 1e-13)
	}
}

func TestNoScanBeatsTheExtremes(t *testing.T) {
	random := rand.New(rand.NewPCG(12, 1))
	for range 400 {
		curve := randomCurve(t, random)
		from, to := curve.Range()
		lo := from + (to-from)*random.Float64()
		hi := lo + (to-lo)*random.Float64()
		e, ok := curve.Extremes(lo, hi)
		if !ok {
			t.Fatal("no extremes inside the range")
		}
		lowest, highest := math.Inf(1), math.Inf(-1)
		const steps = 3000
		for i := range steps + 1 {
			v := at(t, curve, math.Min(lo+(hi-lo)*float64(i)/steps, hi))
			lowest, highest = math.Min(lowest, v), math.Max(highest, v)
		}
		size := math.Max(math.Abs(e.Min), math.Abs(e.Max))
		if lowest < e.Min-1e-14*size || highest > e.Max+1e-14*size {
			t.Fatalf("a scan found %v to %v beyond %v to %v", lowest, highest, e.Min, e.Max)
		}
		// Nor do they claim more than the curve has.
		if at(t, curve, e.MinAt) > e.Min+1e-14*size || at(t, curve, e.MaxAt) < e.Max-1e-14*size {
			t.Fatalf("the curve does not reach its extremes %v", e)
		}
	}
}

func TestTurningPointsSplitTheCurveIntoMonotoneParts(t *testing.T) {
	random := rand.New(rand.NewPCG(13, 1))
	for range 300 {
		curve := randomCurve(t, random)
		edges, to := []float64{}, 0.0
		edges, to = append(edges, curve.Segments[0].From), curve.Segments[len(curve.Segments)-1].To
		for _, p := range curve.TurningPoints() {
			edges = append(edges, p.T)
		}
		edges = append(edges, to)
		for i := 1; i < len(edges); i++ {
			monotone(t, curve, edges[i-1], edges[i])
		}
	}
}

// monotone fails when the curve both rises and falls between lo and hi.
func monotone(t *testing.T, curve Curve, lo, hi float64) {
	t.Helper()
	var rises, falls float64
	last := at(t, curve, lo)
	for i := 1; i <= 500; i++ {
		v := at(t, curve, math.Min(lo+(hi-lo)*float64(i)/500, hi))
		rises, falls = math.Max(rises, v-last), math.Max(falls, last-v)
		last = v
	}
	e, _ := curve.Extremes(lo, hi)
	rounding := 1e-13 * math.Max(math.Abs(e.Min), math.Abs(e.Max))
	if rises > rounding && falls > rounding {
		t.Fatalf("between %s and %s it rises by %g and falls by %g", celsius(lo), celsius(hi), rises, falls)
	}
}

func TestBandContainsEveryCurveInsideTheLimits(t *testing.T) {
	random := rand.New(rand.NewPCG(14, 1))
	for range 200 {
		nominal := randomPolynomial(random)
		nominal.Alpha, nominal.Beta, nominal.Gamma = nominal.Alpha/10, nominal.Beta/10, nominal.Gamma/10
		around := func(v, most float64) *Bounds {
			return &Bounds{v - most*random.Float64(), v + most*random.Float64()}
		}
		y0, alpha := around(nominal.Y0, 0.1*nominal.Y0), around(nominal.Alpha, 1e-5)
		beta, gamma := around(nominal.Beta, 1e-7), around(nominal.Gamma, 1e-11)
		lo, hi := c(-60), c(150)
		band := Band{Corners: curvesOf(nominal.Corners(y0, alpha, beta, gamma), lo, hi)}
		if len(band.Corners) != 16 {
			t.Fatalf("four limits have 16 corners: got %d", len(band.Corners))
		}
		bounds, err := MeasureBand(band.Corners, c(23), c(-40), c(125))
		if err != nil {
			continue // a corner is not positive: no measures to compare
		}
		within := func(b *Bounds) float64 { return b.Lower + (b.Upper-b.Lower)*random.Float64() }
		for range 20 {
			p := Polynomial{within(y0), within(alpha), within(beta), within(gamma), nominal.Reference}
			insideBand(t, band, bounds, p.Curve(lo, hi), c(-40+165*random.Float64()))
		}
	}
}

func insideBand(t *testing.T, band Band, bounds BandMeasures, curve Curve, k float64) {
	t.Helper()
	holds := func(what string, b Bounds, v, size float64) {
		t.Helper()
		if v < b.Lower-1e-13*size || v > b.Upper+1e-13*size {
			t.Fatalf("%s %v outside %v", what, v, b)
		}
	}
	b, _ := band.At(k)
	v := at(t, curve, k)
	holds("value", b, v, math.Abs(v))
	b, _ = band.RatioAt(k, c(23))
	holds("ratio", b, v/at(t, curve, c(23)), 1)
	m := measure(t, curve, c(23), c(-40), c(125))
	holds("change", bounds.Change, m.Change.Greatest, 1)
	holds("slope at the reference", bounds.SlopeAtReference, m.SlopeAtReference, 1)
	holds("smallest slope", bounds.Slope, m.SlopeMin, 1)
	holds("greatest slope", bounds.Slope, m.SlopeMax, 1)
	holds("chord cold", *bounds.ChordCold, *m.ChordCold, 1)
	holds("chord hot", *bounds.ChordHot, *m.ChordHot, 1)
	if m.Box > bounds.Box.Upper+1e-13 {
		t.Fatalf("box %v above %v", m.Box, bounds.Box.Upper)
	}
}

func TestMeasuresAgreeWithOneAnother(t *testing.T) {
	random := rand.New(rand.NewPCG(15, 1))
	compared := 0
	for range 500 {
		curve := randomCurve(t, random)
		from, to := curve.Range()
		lo := from + 0.4*(to-from)*random.Float64()
		hi := to - 0.4*(to-from)*random.Float64()
		m, err := Measure(curve, lo+(hi-lo)*random.Float64(), lo, hi)
		if _, negative := err.(NotPositive); negative {
			continue
		}
		if err != nil {
			t.Fatal(err)
		}
		compared++
		finiteMeasures(t, m)
		if m.SlopeAtReference < m.SlopeMin-1e-12 || m.SlopeAtReference > m.SlopeMax+1e-12 {
			t.Fatalf("the slope at the reference lies outside its extremes: %+v", m)
		}
		near(t, "the box is the change over the window", m.Box*(hi-lo), m.Change.Max-m.Change.Min, 1e-13*(1+m.Change.Max-m.Change.Min))
		for i := range 200 {
			k := math.Min(lo+(hi-lo)*float64(i)/199, hi)
			d, _ := curve.Slope(k)
			relative := d / at(t, curve, k)
			if i > 0 && (relative < m.SlopeMin-1e-12 || relative > m.SlopeMax+1e-12) {
				t.Fatalf("slope %v at %s outside %v to %v", relative, celsius(k), m.SlopeMin, m.SlopeMax)
			}
		}
	}
	if compared < 200 {
		t.Errorf("only %d curves were compared", compared)
	}
}

func finiteMeasures(t *testing.T, m Measures) {
	t.Helper()
	numbers := []float64{m.SlopeAtReference, m.SlopeMin, m.SlopeMinAt, m.SlopeMax, m.SlopeMaxAt, m.Box,
		m.Change.Min, m.Change.MinAt, m.Change.Max, m.Change.MaxAt, m.Change.Greatest, m.Change.GreatestAt}
	for _, chord := range []*float64{m.ChordCold, m.ChordHot} {
		if chord != nil {
			numbers = append(numbers, *chord)
		}
	}
	for _, p := range m.TurningPoints {
		numbers = append(numbers, p.T, p.Change)
	}
	for _, v := range numbers {
		if finite(v) == 0 {
			t.Fatalf("not finite: %+v", m)
		}
	}
}

// Inside its range a curve of finite coefficients gives finite numbers, whatever
// their size, and nothing panics.
func FuzzNoNaN(f *testing.F) {
	f.Add(1.0, 1e-5, -5e-7, 0.0, 293.15, 233.15, 398.15)
	f.Add(0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 1.0)
	f.Add(1e-8, 1e-300, 1e-300, 1e-300, 300.0, 1.0, 2000.0)
	f.Add(1.7e-8, 5e-324, -5e-324, 0.0, 300.0, 299.0, 301.0)
	f.Add(1e-6, 1e9, -1e9, 1e9, 0.0, 1.0, 2.0)
	f.Fuzz(func(t *testing.T, y0, alpha, beta, gamma, reference, lo, hi float64) {
		for _, v := range []float64{y0, alpha, beta, gamma} {
			if !(math.Abs(v) < 1e12) {
				return
			}
		}
		if !(lo >= 0 && hi < 1e4 && hi-lo > 1e-6 && math.Abs(reference) < 1e4) {
			return
		}
		curve := Polynomial{y0, alpha, beta, gamma, reference}.Curve(lo, hi)
		if len(curve.Segments) == 0 {
			return
		}
		e, ok := curve.Extremes(lo, hi)
		for _, v := range []float64{e.Min, e.Max, at(t, curve, lo), at(t, curve, hi), at(t, curve, 0.5*(lo+hi))} {
			if !ok || finite(v) == 0 {
				t.Fatalf("not finite: %v, %v", e, ok)
			}
		}
		for _, p := range curve.TurningPoints() {
			if finite(p.T) == 0 || p.T < lo-slack || p.T > hi+slack {
				t.Fatalf("a turning point at %v of %v to %v", p.T, lo, hi)
			}
		}
		// A resistance so close to zero that a quotient overflows is none.
		if e.Min > 1e-100 {
			if m, err := Measure(curve, lo, lo, hi); err == nil {
				finiteMeasures(t, m)
			}
		}
	})
}
