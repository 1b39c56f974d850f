package curve

import (
	"math"
	"testing"

	"ohmfolio/generator/published"
)

// Source: NBS Circular 31 and Dellinger (1911): the resistance of a fixed piece
// of copper rises by 0.00393 per °C, its volume resistivity by 0.00681 µΩ·cm per
// °C, which is 1.7241 × (0.00393 + 17e-6) and not 1.7241 × 0.00393.
func TestVolumeAgainstConstantMass(t *testing.T) {
	const gamma, copper = 17e-6, 100.0 / 58 // µΩ·cm: the standard's 1/58 Ω·mm²/m, printed as 1.7241
	table := map[string]map[string]string{}
	for _, row := range published.Rows(t, "expansion_volume_vs_constant_mass.csv") {
		table[row["quantity"]] = row
	}
	piece := Polynomial{Y0: copper, Alpha: 0.00393, Reference: c(20)}.Curve(c(0), c(150))
	volume := must(t)(Resistivity(piece, gamma, c(20)))
	slope, _ := volume.Slope(c(20))
	row := table["copper: volume-resistivity change per C with expansion, 1.7241*(alpha_R+gamma)"]
	near(t, "0.00681 µΩ·cm/°C, printed", slope, published.Number(t, row["printed_value"]), 5e-6)
	near(t, "recomputed", slope, published.Number(t, row["recomputed"]), halfUnit(row["recomputed"]))
	wrong, _ := piece.Slope(c(20))
	if math.Abs(wrong-published.Number(t, row["printed_value"])) < 5e-6 {
		t.Error("without expansion the printed value must not come out")
	}
	row = table["copper: volume-resistivity coefficient = alpha_R + gamma"]
	near(t, "volume coefficient", slope/copper, published.Number(t, row["printed_value"]), 5e-10)

	row = table["copper, 20 to 100 C, volume-resistivity ratio (1+alpha_R*80)*(1+gamma*80)"]
	ratio, _ := Ratio(volume, c(20))
	near(t, "ρ ratio at 100 °C", at(t, ratio, c(100)), published.Number(t, row["recomputed"]), 5e-9)
	row = table["copper, 20 to 100 C, R ratio of a fixed piece (1+alpha_R*80)"]
	back := must(t)(Resistance(volume, gamma, c(20)))
	ratio, _ = Ratio(back, c(20))
	near(t, "R ratio at 100 °C", at(t, ratio, c(100)), published.Number(t, row["recomputed"]), 1.4*1e-9)
}

// Source: Matula (1979), copper, 293 K 1.678 and 400 K 2.402 µΩ·cm, corrected
// for expansion (transcriptions); as a fixed piece divided by 1 + 17e-6·107.
func TestMatulaAsFixedPiece(t *testing.T) {
	rho := must(t)(Table([]float64{293, 400}, []float64{1.678e-8, 2.402e-8}, false))
	ratio, ok := Ratio(must(t)(Resistance(rho, 17e-6, 293)), 293)
	if !ok {
		t.Fatal("no ratio")
	}
	near(t, "R(400 K)/R(293 K)", at(t, ratio, 400), 1.42886692, 1e-8)
	if !ratio.FromTable {
		t.Error("a curve from a table must stay one")
	}
}

func TestExpansionAgainstTheQuotient(t *testing.T) {
	curves := map[string]Curve{
		"straight": Polynomial{Y0: 1.7e-8, Alpha: 0.0039, Reference: c(20)}.Curve(c(-200), c(1000)),
		"cubic":    Polynomial{Y0: 4.9e-7, Alpha: 5e-6, Beta: -4e-7, Gamma: 3e-10, Reference: c(20)}.Curve(c(-200), c(600)),
		"level":    Polynomial{Y0: 1, Reference: c(20)}.Curve(c(-273), c(1000)),
		"table":    must(t)(Table([]float64{10, 50, 100, 300, 900}, []float64{1e-11, 5e-10, 3e-9, 1.7e-8, 6e-8}, false)),
		"linear":   must(t)(Table([]float64{10, 50, 100, 300, 900}, []float64{1e-11, 5e-10, 3e-9, 1.7e-8, 6e-8}, true)),
		"platinum": must(t)(platinum.Curve(c(-200), c(850))),
	}
	for name, rho := range curves {
		for _, gamma := range []float64{17e-6, -2e-6, 3e-5} {
			for _, reference := range []float64{c(20), 0, c(-300)} {
				r := must(t)(Resistance(rho, gamma, reference))
				up := must(t)(Resistivity(rho, gamma, reference))
				home := must(t)(Resistivity(r, gamma, reference))
				lo, hi := rho.Range()
				for i := range 2001 {
					k := math.Min(lo+(hi-lo)*float64(i)/2000, hi)
					y, length := at(t, rho, k), 1+gamma*(k-reference)
					near(t, name+" divided", at(t, r, k)/(y/length), 1, 1e-9)
					near(t, name+" multiplied", at(t, up, k)/(y*length), 1, 1e-9)
					near(t, name+" there and back", at(t, home, k)/y, 1, 2e-9)
				}
				if t.Failed() {
					t.Fatalf("%s, γ %g from %g K", name, gamma, reference)
				}
			}
		}
	}
}

func TestExpansionEdges(t *testing.T) {
	curve := worked.Curve(c(-40), c(125))
	same := must(t)(Resistance(curve, 0, c(20)))
	if len(same.Segments) != 1 || same.Segments[0] != curve.Segments[0] {
		t.Error("no expansion must change nothing")
	}
	r := must(t)(Resistance(curve, 17e-6, c(20)))
	near(t, "nothing changes at the reference temperature", at(t, r, c(20)), 1, 1e-12)
	for name, gamma := range map[string]float64{"shrinks to nothing": -0.01, "not a number": math.NaN(), "infinite": math.Inf(1)} {
		if _, err := Resistance(curve, gamma, c(20)); err == nil {
			t.Errorf("%s: no error", name)
		}
		if _, err := Resistivity(curve, gamma, c(20)); err == nil {
			t.Errorf("%s: no error on the way back", name)
		}
	}
	point := must(t)(Resistance(worked.Curve(c(50), c(50)), 17e-6, c(20)))
	near(t, "a curve of one temperature", at(t, point, c(50)), worked.At(c(50))/(1+17e-6*30), 1e-15)
	if _, ok := Ratio(curve, c(200)); ok {
		t.Error("a ratio to a temperature outside the range")
	}
	if _, ok := Ratio((Polynomial{Reference: c(20)}).Curve(c(0), c(100)), c(20)); ok {
		t.Error("a ratio to zero")
	}
}

// By hand: P/(1 + γτ), P = 1 + ατ + βτ², turns where (α − γ) + 2βτ + βγτ² = 0.
func TestExpansionMovesThePeak(t *testing.T) {
	const gamma = 17e-6
	r := must(t)(Resistance(worked.Curve(c(-55), c(150)), gamma, c(20)))
	a, b, d := worked.Alpha-gamma, 2*worked.Beta, worked.Beta*gamma
	tau := -2 * a / (b - math.Sqrt(b*b-4*a*d)) // the root near −7 K
	points := r.TurningPoints()
	if len(points) != 1 || !points[0].Maximum {
		t.Fatalf("got %v, want one maximum", points)
	}
	near(t, "peak at", points[0].T, c(20)+tau, 1e-3)
}

// Taking an R-type α of CuMn12Ni for a ρ-type one moves R at 105 °C by about
// 1,500 ppm (definitions of the project: 17.5e-6·85 = 1488 ppm).
func TestBasisMatters(t *testing.T) {
	curve := worked.Curve(c(-40), c(125))
	r := must(t)(Resistance(curve, 17.5e-6, c(20)))
	near(t, "ppm at 105 °C", (at(t, r, c(105))/at(t, curve, c(105))-1)*1e6, -17.5*85/(1+17.5e-6*85), 0.01)
}
