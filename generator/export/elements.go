package export

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"math"
	"sort"
	"strconv"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/material"
)

// elementError is how far linear interpolation between the rows of an element
// table may be off, relative.
const elementError = 1e-5

// Elements are the rows of a table for a finite-element program: ascending
// kelvin, SI units, close enough for linear interpolation within 10 ppm.
func Elements(r *material.Record) ([]float64, error) {
	set := r.Adopted
	if set == nil || !set.Rho.HasNominal() || set.Valid.Hi <= set.Valid.Lo {
		return nil, fmt.Errorf("%s tells no nominal curve of ρ", r.ID)
	}
	var list []float64
	for _, g := range set.Rho.Nominal.Segments {
		lo, hi := math.Max(g.From, set.Valid.Lo), math.Min(g.To, set.Valid.Hi)
		if hi <= lo {
			continue
		}
		n := cells(g, lo, hi)
		for i := range n {
			list = append(list, lo+float64((hi-lo)*float64(i)/float64(n)))
		}
		list = append(list, hi)
	}
	sort.Float64s(list)
	kept := list[:0]
	for i, t := range list {
		if i == 0 || t > kept[len(kept)-1]+1e-9 {
			kept = append(kept, t)
		}
	}
	return kept, nil
}

// cells is how many even parts of [lo, hi] keep |f″|h²/8 under the error.
func cells(g curve.Segment, lo, hi float64) int {
	bend := math.Max(math.Abs(2*g.C[2]+6*g.C[3]*(lo-g.Centre)), math.Abs(2*g.C[2]+6*g.C[3]*(hi-g.Centre)))
	least := math.Inf(1)
	for _, t := range []float64{lo, hi} {
		x := t - g.Centre
		least = math.Min(least, math.Abs(g.C[0]+x*(g.C[1]+x*(g.C[2]+x*g.C[3]))))
	}
	if !(bend > 0) || !(least > 0) {
		return 1
	}
	return min(1000, max(1, int(math.Ceil((hi-lo)/math.Sqrt(8*elementError*least/bend)))))
}

var elementHeads = []string{"material", "data_set", "condition", "class", "revision", "fingerprint", "status", "temperature_K", "resistivity_ohm_m", "conductivity_S_per_m",
	"reference_temperature_C", "valid_from_K", "valid_to_K", "expansion", "between_rows", "outside"}

// WriteElements writes the table as CSV, with its identity in every row.
func WriteElements(w *bytes.Buffer, r *material.Record, temperatures []float64) error {
	set := r.Adopted
	c := csv.NewWriter(w)
	c.UseCRLF = true
	if err := c.Write(elementHeads); err != nil {
		return err
	}
	expansion := "corrected for expansion: use the true dimensions at each temperature"
	if _, known := r.Expansion(); set.Basis != material.Resistivity && !known || set.Basis == "" {
		expansion = "not corrected for expansion: use the dimensions of the reference temperature"
	}
	for _, t := range temperatures {
		rho, ok := set.Rho.Nominal.At(t)
		if !ok {
			continue
		}
		err := c.Write([]string{r.ID, set.Name, safeCell(set.Condition), string(set.Class), strconv.Itoa(r.Revision), r.Fingerprint, string(r.Status), number(t), number(rho), number(1 / rho),
			celsius(set.RatioReference), number(set.Valid.Lo), number(set.Valid.Hi), expansion, "linear, within 10 ppm", outsideWords})
		if err != nil {
			return err
		}
	}
	c.Flush()
	return c.Error()
}
