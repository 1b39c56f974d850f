package statement

import (
	"fmt"
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// SlopeAnswer is the slope (1/R)dR/dT in ppm/K.
type SlopeAnswer struct {
	AtReference float64 `json:"at_reference"`
	Min         float64 `json:"min"`
	Max         float64 `json:"max"`
}

// ChordAnswer holds the chords in ppm/K; null when that edge of the window is
// not on its side of the reference temperature.
type ChordAnswer struct {
	Cold *float64 `json:"cold"`
	Hot  *float64 `json:"hot"`
}

// ChangeAnswer is the change over the window in ppm of R at the reference
// temperature.
type ChangeAnswer struct {
	MinPPM      float64 `json:"min_ppm"`
	MinAtC      float64 `json:"min_at_C"`
	MaxPPM      float64 `json:"max_ppm"`
	MaxAtC      float64 `json:"max_at_C"`
	GreatestPPM float64 `json:"greatest_ppm"`
	GreatestAtC float64 `json:"greatest_at_C"`
}

// TurnAnswer is one turning point of R over the whole valid range.
type TurnAnswer struct {
	C            float64 `json:"C"`
	Kind         string  `json:"kind"` // maximum, minimum
	PPM          float64 `json:"ppm"`
	InsideWindow bool    `json:"inside_window"`
}

// TCRLimits is the worst case of the measures over the limits of the
// coefficients, in ppm/K and ppm.
type TCRLimits struct {
	BoxPPMPerK  [2]float64 `json:"box_ppm_per_K"`
	GreatestPPM [2]float64 `json:"greatest_ppm"`
	Covers      []string   `json:"covers"`
	NotCovered  []string   `json:"not_covered"`
}

// TCRAnswer is every measure of the temperature coefficient over one window.
// Its JSON form is the contract of the tcr command.
type TCRAnswer struct {
	Material      string       `json:"material"`
	Data          string       `json:"data"`
	Basis         string       `json:"basis"`
	ReferenceC    float64      `json:"reference_C"`
	WindowC       [2]float64   `json:"window_C"`
	Slope         SlopeAnswer  `json:"slope_ppm_per_K"`
	Chord         ChordAnswer  `json:"chord_ppm_per_K"`
	Box           float64      `json:"box_ppm_per_K"`
	Change        ChangeAnswer `json:"change"`
	TurningPoints []TurnAnswer `json:"turning_points"`
	Limits        *TCRLimits   `json:"limits"`
	Source        string       `json:"source"`
	Checked       string       `json:"checked"`
	Status        string       `json:"status"`
	Revision      int          `json:"revision"`
	Fingerprint   string       `json:"fingerprint"`
	Caveats       []string     `json:"caveats"`
}

// TCR gives every measure over the window [lo, hi] about the reference
// temperature (K; nil: the data set's own). The error says why it cannot be
// told: no coefficient, or an edge outside the valid range.
func TCR(lib *library.Library, r *material.Record, setName string, lo, hi float64, reference *float64) (TCRAnswer, error) {
	set := r.Set(setName)
	if set == nil {
		return TCRAnswer{}, fmt.Errorf("%s has no data set %q; it has %s", r.ID, setName, setNames(r))
	}
	if set.Ratio == nil {
		return TCRAnswer{}, fmt.Errorf("the temperature coefficient of %s cannot be told: no coefficient", r.ID)
	}
	ref := referenceOf(set, reference)
	for _, t := range []float64{ref, lo, hi} {
		if !set.Valid.Contains(t) {
			return TCRAnswer{}, OutsideError{At: t, Valid: set.Valid}
		}
	}
	if !set.Ratio.HasNominal() {
		return TCRAnswer{}, fmt.Errorf("%s, data set %s, states limits without a nominal curve; the measures cannot be told", r.ID, set.Name)
	}
	m, err := curve.Measure(set.Ratio.Nominal, ref, lo, hi)
	if err != nil {
		return TCRAnswer{}, err
	}
	a := tcrOf(m)
	a.Material, a.Data, a.Basis = r.ID, set.Name, orNotStated(string(set.Basis))
	a.Source, a.Checked = set.Source.ID, orNotStated(string(lib.CheckedOf(set.Source)))
	a.Status, a.Revision, a.Fingerprint = string(r.Status), r.Revision, r.Fingerprint
	a.Caveats = append([]string{}, set.Caveats...)
	if m.FromTable {
		a.Caveats = append(a.Caveats, "slopes, turning points and extremes are limited by the spacing of the table")
	}
	a.Limits = tcrLimits(set, ref, lo, hi)
	return a, nil
}

func perMillion(x float64) float64 { return quantity.Round12(x * 1e6) }

func tcrOf(m curve.Measures) TCRAnswer {
	a := TCRAnswer{
		ReferenceC: quantity.Round12(m.Reference - quantity.ZeroCelsius), WindowC: [2]float64{quantity.Round12(m.Lo - quantity.ZeroCelsius), quantity.Round12(m.Hi - quantity.ZeroCelsius)},
		Slope: SlopeAnswer{perMillion(m.SlopeAtReference), perMillion(m.SlopeMin), perMillion(m.SlopeMax)},
		Chord: ChordAnswer{Cold: chordOf(m.ChordCold), Hot: chordOf(m.ChordHot)},
		Box:   perMillion(m.Box),
		Change: ChangeAnswer{
			MinPPM: perMillion(m.Change.Min), MinAtC: quantity.Round12(m.Change.MinAt - quantity.ZeroCelsius),
			MaxPPM: perMillion(m.Change.Max), MaxAtC: quantity.Round12(m.Change.MaxAt - quantity.ZeroCelsius),
			GreatestPPM: perMillion(m.Change.Greatest), GreatestAtC: quantity.Round12(m.Change.GreatestAt - quantity.ZeroCelsius),
		},
		TurningPoints: []TurnAnswer{},
	}
	for _, t := range m.TurningPoints {
		kind := "minimum"
		if t.Maximum {
			kind = "maximum"
		}
		a.TurningPoints = append(a.TurningPoints, TurnAnswer{quantity.Round12(t.T - quantity.ZeroCelsius), kind, perMillion(t.Change), t.Inside})
	}
	return a
}

func chordOf(x *float64) *float64 {
	if x == nil {
		return nil
	}
	p := perMillion(*x)
	return &p
}

// tcrLimits takes the extremes of box and greatest change over all corners of
// the stated limits; nil when no coefficient has limits.
func tcrLimits(set *material.DataSet, ref, lo, hi float64) *TCRLimits {
	band := set.Ratio.Limits
	if band == nil {
		return nil
	}
	l := TCRLimits{BoxPPMPerK: [2]float64{math.Inf(1), math.Inf(-1)}, GreatestPPM: [2]float64{math.Inf(1), math.Inf(-1)}}
	for _, c := range band.Corners {
		m, err := curve.Measure(c, ref, lo, hi)
		if err != nil {
			return nil
		}
		widen(&l.BoxPPMPerK, perMillion(m.Box))
		widen(&l.GreatestPPM, perMillion(m.Change.Min))
		widen(&l.GreatestPPM, perMillion(m.Change.Max))
	}
	l.Covers, l.NotCovered = nonNil(band.Covers), nonNil(band.NotCovered)
	return &l
}

func widen(b *[2]float64, x float64) {
	b[0], b[1] = math.Min(b[0], x), math.Max(b[1], x)
}
