package material

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/place"
)

// randomModels writes a random record of every model, in the sizes that the
// trade knows, with and without limits, uncertainties and expansion.
var randomModels = map[string]func(r *rand.Rand) (yaml string, beside map[string][]byte){
	"polynomial": func(r *rand.Rand) (string, map[string][]byte) {
		return fmt.Sprintf("basis: %s\nreference_temperature: %d °C\nresistivity: %.4g µΩ·cm%s\nalpha: %.4g ppm/K%s\nbeta: %.3g ppm/K²%s\nvalid_range: -55 °C to 155 °C\n",
			pick(r, "resistance", "resistivity"), 15+r.IntN(15), 2+140*r.Float64(), pick(r, "", " ± 5 %", " ± 0.3 % (k=2)", " +4/-8 %"),
			-50+100*r.Float64(), pick(r, "", " ± 20 ppm/K", " ± 1 ppm/K (k=2)"), -1+2*r.Float64(), pick(r, "", " ± 0.2 ppm/K²")), nil
	},
	"limits alone": func(r *rand.Rand) (string, map[string][]byte) {
		return fmt.Sprintf("basis: resistance\nreference_temperature: 20 °C\nresistivity: 43 µΩ·cm ± 4 %%\nalpha: -%.3g to %.3g ppm/K\nbeta: -0.7 to 0 ppm/K²\nvalid_range: -55 °C to 155 °C\n",
			1+30*r.Float64(), 1+30*r.Float64()), nil
	},
	"chord": func(r *rand.Rand) (string, map[string][]byte) {
		return fmt.Sprintf("basis: resistance\nresistivity: 49 µΩ·cm\nreference_temperature: 20 °C\nchord: {value: %.3g ppm/K, from: 20 °C, to: 105 °C}\n", -60+120*r.Float64()), nil
	},
	"table of ρ": func(r *rand.Rand) (string, map[string][]byte) {
		return fmt.Sprintf("basis: %s\ntable: {temperature: K, resistivity: µΩ·cm%s, rows: [%s]}\n",
			pick(r, "resistivity", "\"resistivity, uncorrected\"\ndimensions_at: 20 °C"), pick(r, "", ", each_row: ± 1 %", ", each_row: ± 0.5 % (k=2)"), rows(r, 80, 0.2)), nil
	},
	"table of factors": func(r *rand.Rand) (string, map[string][]byte) {
		return fmt.Sprintf("basis: resistance\nresistivity: 109 µΩ·cm ± 5 %%\nreference_temperature: 20 °C\ntable: {temperature: °C, resistance_ratio: 1, interpolate: %s, rows: [[20, 1], [100, %.4g], [300, %.4g], [900, %.4g]]}\n",
			pick(r, "linear", "monotone"), 1+0.01*r.Float64(), 1.01+0.03*r.Float64(), 1.02+0.05*r.Float64()), nil
	},
	"callendar-van-dusen": func(r *rand.Rand) (string, map[string][]byte) {
		return fmt.Sprintf("basis: resistance\nreference_temperature: 0 °C\ncallendar_van_dusen: {A: %.5ge-3 /°C%s, B: -5.775e-7 /°C², C: -4.183e-12 /°C⁴}\nvalid_range: -200 °C to 850 °C\n",
			3.9+0.02*r.Float64(), pick(r, "", " ± 0.1 %", " ± 0.05 % (k=2)")), nil
	},
	"bloch-gruneisen": func(r *rand.Rand) (string, map[string][]byte) {
		return fmt.Sprintf("basis: resistivity\nbloch_gruneisen: {residual: %.3g µΩ·cm, debye_temperature: %.4g K, amplitude: %.4g µΩ·cm, exponent: %d}\nvalid_range: 4 K to 1300 K\n",
			0.0001+0.1*r.Float64(), 100+400*r.Float64(), 2+30*r.Float64(), []int{2, 3, 5}[r.IntN(3)]), nil
	},
	"points": func(r *rand.Rand) (string, map[string][]byte) {
		var csv strings.Builder
		csv.WriteString("temperature / °C,resistance / mΩ,uncertainty / mΩ\n")
		alpha, beta := 30*(r.Float64()-0.5)*1e-6, -1e-6*r.Float64()
		for t := -40.0; t <= 110; t += 15 {
			fmt.Fprintf(&csv, "%g,%.9g,0.0002\n", t, 8.6*(1+alpha*(t-25)+beta*(t-25)*(t-25))+0.0002*r.NormFloat64())
		}
		return "basis: resistance\npoints: p.csv\nfit: {reference_temperature: 25 °C, degree: 2}\nspecimen: {between_taps: 200.00 mm ± 0.05 mm (k=2), width: 10.02 mm ± 0.02 mm (k=2), thickness: 1.004 mm ± 0.004 mm (k=2), at: 23 °C}\nvalid_range: -40 °C to 110 °C\n",
			map[string][]byte{"p.csv": []byte(csv.String())}
	},
}

func pick(r *rand.Rand, list ...string) string { return list[r.IntN(len(list))] }

func rows(r *rand.Rand, from, rise float64) string {
	var list []string
	t, y := from, 0.1+rise*r.Float64()
	for range 4 + r.IntN(8) {
		list = append(list, fmt.Sprintf("[%.5g, %.5g]", t, y))
		t, y = t+20+80*r.Float64(), y*(1.05+rise*r.Float64())
	}
	return strings.Join(list, ", ")
}

// TestEveryModelTellsTheTruth holds over random records of every model: no
// NaN inside the valid range and nothing outside; the band contains the
// nominal and every corner; R/R and ρ agree through the expansion;
// re-referencing there and back; extremes beaten by no dense scan.
func TestEveryModelTellsTheTruth(t *testing.T) {
	for model, write := range randomModels {
		t.Run(model, func(t *testing.T) {
			random := rand.New(rand.NewPCG(21, uint64(len(model))))
			for range 60 {
				yaml, beside := write(random)
				gamma := 0.0
				if random.IntN(2) == 0 {
					gamma = 17e-6
					yaml += "properties: {expansion: {value: 17e-6 /K, source: s}}\n"
				}
				text := "name: X\nsource: s\n" + yaml
				r, findings := Read("x", place.NewSource("materials/x.yaml", []byte(text)), func(name string) *place.Source {
					if b, ok := beside[name]; ok {
						return place.NewSource("materials/"+name, b)
					}
					return nil
				})
				if place.Count(findings, place.Error) > 0 {
					t.Fatalf("%v\n%s", findings, text)
				}
				s := r.Adopted
				if s.Rho == nil && s.Ratio == nil {
					t.Fatalf("tells nothing:\n%s", text)
				}
				toldTruly(t, text, s, s.Rho)
				toldTruly(t, text, s, s.Ratio)
				basesAgree(t, text, s, gamma)
			}
		})
	}
}

func toldTruly(t *testing.T, text string, s *DataSet, told *Told) {
	t.Helper()
	if told == nil {
		return
	}
	read := Reading{Told: told}
	span := s.Valid.Hi - s.Valid.Lo
	var lowest, highest = math.Inf(1), math.Inf(-1)
	for i := range 401 {
		at := math.Min(s.Valid.Lo+span*float64(i)/400, s.Valid.Hi)
		v, ok := read.At(at)
		if told.HasNominal() {
			if !ok || math.IsNaN(v) || math.IsInf(v, 0) {
				t.Fatalf("%v at %g K\n%s", v, at, text)
			}
			lowest, highest = math.Min(lowest, v), math.Max(highest, v)
		}
		if told.Uncertainty != nil {
			if u := told.Uncertainty(at); !(u >= 0) || math.IsInf(u, 0) {
				t.Fatalf("uncertainty %v at %g K\n%s", u, at, text)
			}
		}
		if l, limited := read.Limits(at); limited {
			if ok && (v < l.Lower-1e-12*math.Abs(v) || v > l.Upper+1e-12*math.Abs(v)) {
				t.Fatalf("nominal %v outside its band %v at %g K\n%s", v, l, at, text)
			}
			for _, c := range told.Limits.Corners {
				if y, _ := c.At(at); y < l.Lower-1e-12*math.Abs(y) || y > l.Upper+1e-12*math.Abs(y) {
					t.Fatalf("corner %v outside the band %v at %g K\n%s", y, l, at, text)
				}
			}
		}
	}
	for _, beyond := range []float64{s.Valid.Lo - 0.01, s.Valid.Hi + 0.01} {
		if v, ok := read.At(beyond); ok {
			t.Fatalf("%v outside the valid range, at %g K\n%s", v, beyond, text)
		}
	}
	if told.HasNominal() {
		extremesHold(t, text, told.Nominal, lowest, highest)
	}
}

func extremesHold(t *testing.T, text string, c curve.Curve, lowest, highest float64) {
	t.Helper()
	lo, hi := c.Range()
	e, ok := c.Extremes(lo, hi)
	size := 1e-13 * math.Max(math.Abs(e.Min), math.Abs(e.Max))
	if !ok || lowest < e.Min-size || highest > e.Max+size {
		t.Fatalf("a scan found %v to %v beyond %v to %v\n%s", lowest, highest, e.Min, e.Max, text)
	}
	mid := lo + 0.37*(hi-lo)
	there, ok := curve.Ratio(c, mid)
	if !ok {
		t.Fatalf("no reference at %g K\n%s", mid, text)
	}
	back, ok := curve.Ratio(there, lo)
	first, _ := curve.Ratio(c, lo)
	for i := range 50 {
		at := math.Min(lo+(hi-lo)*float64(i)/49, hi)
		a, _ := back.At(at)
		b, _ := first.At(at)
		if !ok || math.Abs(a-b) > 1e-13*math.Abs(b) {
			t.Fatalf("re-referenced there and back %v, straight %v at %g K\n%s", a, b, at, text)
		}
	}
}

// basesAgree: R(T)/R(T₁) = ρ(T)/ρ(T₁) · (1 + ε(T₁))/(1 + ε(T)), ε counted from
// the temperature of the dimensions (definitions, basis); without a known
// expansion the two ratios are the same.
func basesAgree(t *testing.T, text string, s *DataSet, gamma float64) {
	t.Helper()
	if !s.Rho.HasNominal() || !s.Ratio.HasNominal() {
		return
	}
	from := s.Reference
	switch {
	case s.Basis == Uncorrected:
		from = s.DimensionsAt
	case math.IsNaN(from):
		from = s.RatioReference
	}
	expansion := func(at float64) float64 { return 1 + gamma*(at-from) }
	t1 := s.RatioReference
	for i := range 60 {
		at := math.Min(s.Valid.Lo+(s.Valid.Hi-s.Valid.Lo)*float64(i)/59, s.Valid.Hi)
		ratio, _ := Reading{Told: s.Ratio, Ratio: true, Reference: t1}.At(at)
		rho, _ := Reading{Told: s.Rho, Ratio: true, Reference: t1}.At(at)
		want := rho * expansion(t1) / expansion(at)
		if math.Abs(ratio-want) > 3e-9*math.Abs(want) {
			t.Fatalf("R/R %.12g, from ρ and expansion %.12g at %g K\n%s", ratio, want, at, text)
		}
	}
}

// TestTolerances: ± on Callendar coefficients and on rows reaches the band.
func TestTolerances(t *testing.T) {
	read := func(text string) *DataSet {
		r, findings := Read("x", place.NewSource("materials/x.yaml", []byte("name: X\nsource: s\n"+text)), nil)
		if place.Count(findings, place.Error) > 0 {
			t.Fatal(findings)
		}
		return r.Adopted
	}
	// At 100 °C a change of A by 0.1 % moves the ratio by A·t·0.001.
	s := read("basis: resistance\nreference_temperature: 0 °C\ncallendar_van_dusen: {A: 3.9083e-3 /°C ± 0.1 %, B: -5.775e-7 /°C²}\nvalid_range: 0 °C to 850 °C\n")
	l, ok := Reading{Told: s.Ratio}.Limits(373.15)
	if !ok || math.Abs(l.Upper-1.385055-3.9083e-4) > 1e-12 || math.Abs(l.Lower-1.385055+3.9083e-4) > 1e-12 {
		t.Errorf("limits of the ratio at 100 °C: %v", l)
	}
	s = read("basis: resistance\nreference_temperature: 0 °C\ncallendar_van_dusen: {A: 3.9083e-3 /°C ± 0.1 % (k=2), B: -5.775e-7 /°C²}\nvalid_range: 0 °C to 850 °C\n")
	if u := s.Ratio.Uncertainty(373.15); math.Abs(u-3.9083e-4/2) > 1e-12 {
		t.Errorf("standard uncertainty of the ratio at 100 °C: %v", u)
	}
	s = read("basis: resistivity\ntable: {temperature: K, resistivity: µΩ·cm, each_row: ± 1 %, rows: [[100, 1], [300, 3]]}\n")
	if l, ok := (Reading{Told: s.Rho}).Limits(300); !ok || math.Abs(l.Upper-3.03e-8) > 1e-20 || math.Abs(l.Lower-2.97e-8) > 1e-20 {
		t.Errorf("limits of a row: %v", l)
	}
	if s.Ratio.Limits != nil || !strings.Contains(strings.Join(s.Ratio.NoLimits, ";"), "err together") {
		t.Errorf("the ratio of rows has limits %v, %v", s.Ratio.Limits, s.Ratio.NoLimits)
	}
}

// TestRatioPieces joins the two branches of a thermometer that has no
// resistivity.
func TestRatioPieces(t *testing.T) {
	text := "name: X\nadopt: joined\ndata_sets:\n" +
		"  cold: {source: s, basis: resistance, reference_temperature: 0 °C, alpha: 4.28e-3 /K, beta: -6.2e-7 /K², valid_range: -100 °C to 0 °C}\n" +
		"  warm: {source: s, basis: resistance, reference_temperature: 0 °C, alpha: 4.28e-3 /K, valid_range: 0 °C to 180 °C}\n" +
		"  joined: {source: s, pieces: [cold, warm]}\n"
	r, findings := Read("x", place.NewSource("materials/x.yaml", []byte(text)), nil)
	if place.Count(findings, place.Error) > 0 {
		t.Fatal(findings)
	}
	for at, want := range map[float64]float64{173.15: 1 - 0.428 - 0.0062, 273.15: 1, 373.15: 1.428} {
		if v, ok := (Reading{Told: r.Adopted.Ratio}).At(at); !ok || math.Abs(v-want) > 1e-12 {
			t.Errorf("%g K: %v, want %v", at, v, want)
		}
	}
	if r.Adopted.Rho != nil {
		t.Error("pieces of ratios tell a resistivity")
	}
	_, findings = Read("x", place.NewSource("materials/x.yaml", []byte(strings.Replace(text, "warm: {source: s, basis: resistance, reference_temperature: 0 °C", "warm: {source: s, basis: resistance, reference_temperature: 20 °C", 1))), nil)
	if place.Count(findings, place.Error) != 1 || findings[0].Code != "pieces-do-not-join" {
		t.Errorf("pieces about two temperatures: %v", findings)
	}
}
