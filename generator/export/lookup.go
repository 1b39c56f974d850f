package export

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"math"
	"strconv"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// A Lookup is R(T)/R(reference) in integers for linear interpolation in
// firmware: value = Counts[i]/Scale at First + i·Step. Between two rows the
// interpolated value is off by less than one count; Error says by how much at
// most, rounding of the rows included.
type Lookup struct {
	Reference   float64 // K, where the ratio is 1
	First, Step int     // hundredths of °C
	Scale       int
	Counts      []int32
	Error       float64 // counts, proven from the cubic segments
}

// The steps that are tried, in hundredths of °C, largest first, and how many
// rows a table may have.
var lookupSteps = []int{5000, 2500, 2000, 1000, 500, 250, 200, 100, 50, 25, 20, 10}

const mostRows = 4096

// NewLookup makes the table of the adopted set over its valid range with the
// finest scale from 10⁶ down that needs no more than 4096 rows.
func NewLookup(r *material.Record) (Lookup, error) {
	set := r.Adopted
	if set == nil || !set.Ratio.HasNominal() {
		return Lookup{}, fmt.Errorf("%s tells no nominal curve of R", r.ID)
	}
	c, ok := curve.Ratio(set.Ratio.Nominal, set.RatioReference)
	if !ok {
		return Lookup{}, fmt.Errorf("%s has no R at its reference temperature", r.ID)
	}
	for scale := 1000000; scale >= 1000; scale /= 10 {
		for _, whole := range []bool{true, false} { // rather a step that meets both ends
			for _, step := range lookupSteps {
				l := Lookup{Reference: set.RatioReference, Step: step, Scale: scale}
				if (!whole || l.meets(set.Valid)) && l.fill(c, set.Valid) && l.Error < 1 {
					return l, nil
				}
			}
		}
	}
	return Lookup{}, fmt.Errorf("%s has no table of %d rows within one count in a thousand", r.ID, mostRows)
}

func hundredths(k float64) float64 { return (k - quantity.ZeroCelsius) * 100 }

func (l *Lookup) kelvin(i int) float64 {
	return quantity.ZeroCelsius + float64(l.First+i*l.Step)/100
}

// meets tells whether rows from the lower end of the range meet its upper end.
func (l *Lookup) meets(valid material.Window) bool {
	over := math.Mod(hundredths(valid.Hi)-math.Ceil(hundredths(valid.Lo)-1e-6)+1e-6, float64(l.Step))
	return over < 2e-6
}

// fill makes the rows and proves their error; false when there are too few or
// too many.
func (l *Lookup) fill(c curve.Curve, valid material.Window) bool {
	first := math.Ceil(hundredths(valid.Lo) - 1e-6)
	n := int(math.Floor((hundredths(valid.Hi)-first)/float64(l.Step)+1e-6)) + 1
	if n < 2 || n > mostRows {
		return false
	}
	l.First, l.Counts = int(first), make([]int32, n)
	for i := range l.Counts {
		v, ok := c.At(clamp(l.kelvin(i), valid))
		x := math.Round(float64(v * float64(l.Scale)))
		if !ok || math.Abs(x) > math.MaxInt32 {
			return false
		}
		l.Counts[i] = int32(x)
	}
	l.Error = l.proven(c, valid)
	return true
}

func clamp(t float64, w material.Window) float64 { return math.Max(w.Lo, math.Min(w.Hi, t)) }

// proven is the largest difference of the curve from the interpolated rows in
// counts: the extremes of cubic minus straight line, cell by cell.
func (l *Lookup) proven(c curve.Curve, valid material.Window) float64 {
	worst, first := 0.0, 0
	for i := range len(l.Counts) - 1 {
		a, b := clamp(l.kelvin(i), valid), clamp(l.kelvin(i+1), valid)
		y0, y1 := float64(l.Counts[i])/float64(l.Scale), float64(l.Counts[i+1])/float64(l.Scale)
		slope := (y1 - y0) / (b - a)
		for first < len(c.Segments)-1 && c.Segments[first].To <= a {
			first++
		}
		for k := first; k < len(c.Segments) && c.Segments[k].From < b; k++ {
			g := c.Segments[k]
			g.C[0] -= y0 + slope*(g.Centre-a)
			g.C[1] -= slope
			one := curve.Curve{Segments: []curve.Segment{g}}
			e, ok := one.Extremes(math.Max(a, g.From), math.Min(b, g.To))
			if ok {
				worst = math.Max(worst, math.Max(math.Abs(e.Min), math.Abs(e.Max)))
			}
		}
	}
	return worst * float64(l.Scale)
}

// facts are what both forms of the table say of themselves.
func (l Lookup) facts() [][2]string {
	last := l.First + (len(l.Counts)-1)*l.Step
	return [][2]string{
		{"value", "R(T)/R(" + number(l.Reference-quantity.ZeroCelsius) + " degC) of a fixed body = count / " + strconv.Itoa(l.Scale)},
		{"rows", strconv.Itoa(len(l.Counts)) + " from " + number(float64(l.First)/100) + " degC to " + number(float64(last)/100) + " degC by " + number(float64(l.Step)/100) + " K"},
		{"between rows", "interpolate linearly; largest error " + quantity.Fixed(l.Error, 2) + " counts, rounding included"},
		{"at the ends", "refuse: outside the rows there is no value"},
	}
}

// WriteHeader writes the table as a C header.
func WriteHeader(w *bytes.Buffer, lib *library.Library, r *material.Record, l Lookup) {
	name := symbol(r.ID)
	w.WriteString("/*\n")
	for _, x := range append(identity(lib, r, r.Adopted), l.facts()...) {
		w.WriteString(" * " + x[0] + ": " + plainASCII(x[1]) + "\n")
	}
	w.WriteString(" */\n#include <stdint.h>\n\n")
	fmt.Fprintf(w, "enum {\n    r_%[1]s_scale = %[2]d,        /* counts for a ratio of 1 */\n    r_%[1]s_first = %[3]d,        /* hundredths of degC */\n    r_%[1]s_step = %[4]d,         /* hundredths of a kelvin */\n    r_%[1]s_rows = %[5]d\n};\n\n", name, l.Scale, l.First, l.Step, len(l.Counts))
	fmt.Fprintf(w, "static const int32_t r_%s[%d] = {", name, len(l.Counts))
	for i, n := range l.Counts {
		if i%8 == 0 {
			w.WriteString("\n    ")
		}
		w.WriteString(strconv.Itoa(int(n)) + ",")
		if i%8 != 7 && i != len(l.Counts)-1 {
			w.WriteByte(' ')
		}
	}
	w.WriteString("\n};\n")
}

// WriteLookup writes the table as CSV, with its identity in every row.
func WriteLookup(w *bytes.Buffer, r *material.Record, l Lookup) error {
	c := csv.NewWriter(w)
	c.UseCRLF = true
	if err := c.Write([]string{"material", "data_set", "revision", "fingerprint", "status", "temperature_C", "count", "scale", "ratio_reference_C", "largest_error_counts"}); err != nil {
		return err
	}
	for i, n := range l.Counts {
		if err := c.Write([]string{r.ID, r.Adopted.Name, strconv.Itoa(r.Revision), r.Fingerprint, string(r.Status), number(float64(l.First+i*l.Step) / 100),
			strconv.Itoa(int(n)), strconv.Itoa(l.Scale), number(l.Reference - quantity.ZeroCelsius), quantity.Fixed(l.Error, 2)}); err != nil {
			return err
		}
	}
	c.Flush()
	return c.Error()
}
