package export

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// MaterialJSON is what a reference states of one material; the names are a contract.
type MaterialJSON struct {
	ID          string         `json:"id"`
	Name        string         `json:"name"`
	Status      string         `json:"status"`
	Invented    bool           `json:"invented,omitempty"`
	Revision    int            `json:"revision"`
	Fingerprint string         `json:"fingerprint"`
	Family      string         `json:"family"`
	DataSets    []DataSetJSON  `json:"data_sets"`
	Properties  []PropertyJSON `json:"properties"`
	Segments    SegmentsJSON   `json:"segments"`
}

// DataSetJSON is one data set with its constants in SI; null is not stated.
type DataSetJSON struct {
	Name        string      `json:"name"`
	Adopted     bool        `json:"adopted"`
	Model       string      `json:"model"`
	Basis       string      `json:"basis"`
	Class       string      `json:"class"`
	Condition   string      `json:"condition"`
	Checked     string      `json:"checked"`
	ReferenceC  *float64    `json:"reference_C"`
	Resistivity *float64    `json:"resistivity_ohm_m"`
	Alpha       *float64    `json:"alpha_per_K"`
	Beta        *float64    `json:"beta_per_K2"`
	Gamma       *float64    `json:"gamma_per_K3"`
	Limits      *LimitsJSON `json:"limits"`
	ValidRangeC [2]float64  `json:"valid_range_C"`
	Source      string      `json:"source"`
	Caveats     []string    `json:"caveats"`
}

// LimitsJSON holds the stated limits of the constants, [lower, upper] in SI;
// null on one side is open.
type LimitsJSON struct {
	Resistivity *[2]*float64 `json:"resistivity_ohm_m,omitempty"`
	Alpha       *[2]*float64 `json:"alpha_per_K,omitempty"`
	Beta        *[2]*float64 `json:"beta_per_K2,omitempty"`
	Gamma       *[2]*float64 `json:"gamma_per_K3,omitempty"`
}

// PropertyJSON is one property as its author wrote it, with its SI value.
type PropertyJSON struct {
	Name    string   `json:"name"`
	Written string   `json:"written"`
	SI      *float64 `json:"si"`
	Source  string   `json:"source"`
	Checked string   `json:"checked"`
}

// SegmentsJSON is the adopted curve as cubic segments in kelvin.
type SegmentsJSON struct {
	Resistivity []SegmentJSON `json:"resistivity_ohm_m"`
	Ratio       *RatioJSON    `json:"resistance_ratio"`
}

// RatioJSON is R/R(reference_K).
type RatioJSON struct {
	ReferenceK float64       `json:"reference_K"`
	Pieces     []SegmentJSON `json:"pieces"`
}

// SegmentJSON is one cubic: value = Σ c[i]·(T − centre_K)^i on [from_K, to_K].
type SegmentJSON struct {
	FromK   float64    `json:"from_K"`
	ToK     float64    `json:"to_K"`
	CentreK float64    `json:"centre_K"`
	C       [4]float64 `json:"c"`
}

// Material gives the data of one material.
func Material(lib *library.Library, r *material.Record) MaterialJSON {
	m := MaterialJSON{ID: r.ID, Name: r.Name, Status: string(r.Status), Invented: r.Invented, Revision: r.Revision,
		Fingerprint: r.Fingerprint, Family: string(r.Family), DataSets: []DataSetJSON{}, Properties: []PropertyJSON{}}
	for _, set := range r.Sets {
		m.DataSets = append(m.DataSets, dataSet(lib, set, set == r.Adopted))
	}
	for _, p := range r.Properties {
		m.Properties = append(m.Properties, properties(lib, p)...)
	}
	m.Segments = segmentsOf(r.Adopted)
	return m
}

func dataSet(lib *library.Library, set *material.DataSet, adopted bool) DataSetJSON {
	d := DataSetJSON{Name: set.Name, Adopted: adopted, Model: string(set.Model), Basis: notStated(string(set.Basis)),
		Class: notStated(string(set.Class)), Condition: notStated(set.Condition), Checked: notStated(string(lib.CheckedOf(set.Source))),
		Source: set.Source.ID, ValidRangeC: [2]float64{quantity.Round12(set.Valid.Lo - quantity.ZeroCelsius), quantity.Round12(set.Valid.Hi - quantity.ZeroCelsius)},
		Caveats: append([]string{}, set.Caveats...)}
	if !math.IsNaN(set.Reference) {
		d.ReferenceC = finite(set.Reference - quantity.ZeroCelsius)
	}
	d.Resistivity, d.Alpha = nominal(set.Resistivity), nominal(set.Alpha)
	d.Beta, d.Gamma = nominal(set.Beta), nominal(set.Gamma)
	l := LimitsJSON{limits(set.Resistivity), limits(set.Alpha), limits(set.Beta), limits(set.Gamma)}
	if l != (LimitsJSON{}) {
		d.Limits = &l
	}
	return d
}

func properties(lib *library.Library, p material.Property) []PropertyJSON {
	one := func(name string, q quantity.Quantity) PropertyJSON {
		return PropertyJSON{Name: name, Written: q.Text, SI: nominal(&q), Source: p.Source.ID, Checked: notStated(string(lib.CheckedOf(p.Source)))}
	}
	if p.Accuracy == nil && p.Continuous == nil {
		return []PropertyJSON{one(p.Name, p.Value)}
	}
	var list []PropertyJSON
	if p.Accuracy != nil {
		list = append(list, one(p.Name+".accuracy", *p.Accuracy))
	}
	if p.Continuous != nil {
		list = append(list, one(p.Name+".continuous", *p.Continuous))
	}
	return list
}

func segmentsOf(set *material.DataSet) SegmentsJSON {
	s := SegmentsJSON{Resistivity: []SegmentJSON{}}
	if set == nil {
		return s
	}
	if set.Rho.HasNominal() {
		s.Resistivity = Segments(set.Rho.Nominal)
	}
	if set.Ratio.HasNominal() {
		s.Ratio = &RatioJSON{ReferenceK: quantity.Round12(set.RatioReference), Pieces: Segments(set.Ratio.Nominal)}
	}
	return s
}

// Segments writes a curve to 12 significant digits.
func Segments(c curve.Curve) []SegmentJSON {
	list := make([]SegmentJSON, len(c.Segments))
	for i, s := range c.Segments {
		list[i] = SegmentJSON{quantity.Round12(s.From), quantity.Round12(s.To), quantity.Round12(s.Centre), [4]float64{quantity.Round12(s.C[0]), quantity.Round12(s.C[1]), quantity.Round12(s.C[2]), quantity.Round12(s.C[3])}}
	}
	return list
}

func nominal(q *quantity.Quantity) *float64 {
	if q == nil || !q.HasValue() {
		return nil
	}
	return finite(q.Value)
}

func limits(q *quantity.Quantity) *[2]*float64 {
	if q == nil || q.Limits == nil {
		return nil
	}
	return &[2]*float64{finite(q.Limits.Lower), finite(q.Limits.Upper)}
}

// finite is x to 12 digits, nil when it is infinite or no number.
func finite(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	x = quantity.Round12(x)
	return &x
}

func notStated(s string) string {
	if s == "" {
		return "not stated"
	}
	return s
}
