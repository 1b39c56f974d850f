package curve

import "testing"

func benchTable(b *testing.B, rows int) Curve {
	x, y := make([]float64, rows), make([]float64, rows)
	for i := range x {
		x[i], y[i] = 20+10*float64(i), 1e-9*float64(i*i+1)
	}
	table, err := Table(x, y, false)
	if err != nil {
		b.Fatal(err)
	}
	return table
}

var keep float64 // what a benchmark computes must be wanted

func BenchmarkAtOneCubic(b *testing.B) {
	curve := worked.Curve(c(-55), c(150))
	b.ReportAllocs()
	k := c(-55)
	for b.Loop() {
		v, _ := curve.At(k)
		keep += v
		if k += 1.37; k > c(150) {
			k = c(-55)
		}
	}
}

func BenchmarkAtTableOf64(b *testing.B) {
	curve := benchTable(b, 64)
	lo, hi := curve.Range()
	b.ReportAllocs()
	k := lo
	for b.Loop() {
		v, _ := curve.At(k)
		keep += v
		if k += 1.37; k > hi {
			k = lo
		}
	}
}

func BenchmarkExtremesOneCubic(b *testing.B) {
	p := worked
	p.Gamma = 1e-9
	curve := p.Curve(c(-55), c(150))
	b.ReportAllocs()
	for b.Loop() {
		e, _ := curve.Extremes(c(-40), c(125))
		keep += e.Max
	}
}

func BenchmarkExtremesTableOf64(b *testing.B) {
	curve := benchTable(b, 64)
	lo, hi := curve.Range()
	b.ReportAllocs()
	for b.Loop() {
		e, _ := curve.Extremes(lo, hi)
		keep += e.Max
	}
}

func BenchmarkMeasureParabola(b *testing.B) {
	curve := worked.Curve(c(-55), c(150))
	b.ReportAllocs()
	for b.Loop() {
		m, _ := Measure(curve, c(20), c(-40), c(125))
		keep += m.Box
	}
}

func BenchmarkMeasureTableOf64(b *testing.B) {
	curve := benchTable(b, 64)
	lo, hi := curve.Range()
	b.ReportAllocs()
	for b.Loop() {
		m, _ := Measure(curve, 300, lo, hi)
		keep += m.Box
	}
}

func BenchmarkLowerPolynomial(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		keep += worked.Curve(c(-55), c(150)).Segments[0].To
	}
}

func BenchmarkLowerTableOf64(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		keep += benchTable(b, 64).Segments[0].To
	}
}

func BenchmarkLowerCallendar(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		curve, _ := platinum.Curve(c(-200), c(850))
		keep += curve.Segments[0].To
	}
}

func BenchmarkLowerExpansion(b *testing.B) {
	rho := Polynomial{Y0: 1.7e-8, Alpha: 0.0039, Reference: c(20)}.Curve(c(-50), c(200))
	b.ReportAllocs()
	for b.Loop() {
		curve, _ := Resistance(rho, 17e-6, c(20))
		keep += curve.Segments[0].To
	}
}

func BenchmarkLowerBloch(b *testing.B) {
	m := BlochGruneisen{Residual: 2e-11, Theta: 333, Amplitude: 8e-8, Exponent: 5}
	b.ReportAllocs()
	for b.Loop() {
		curve, _ := m.Curve(4, 900)
		keep += curve.Segments[0].To
	}
}

func BenchmarkTemperatureOfPlatinum(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		k, _ := platinum.Temperature(0.6)
		keep += k
	}
}
