package export

import (
	"bytes"
	"fmt"
	"math"
	"strconv"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/fit"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// SimulatorNominal is the nominal temperature that most circuit simulators
// assume: 27 °C.
const SimulatorNominal = quantity.ZeroCelsius + 27

// A Line is R(T) as a circuit simulator takes it:
//
//	R(T) = R(Nominal)·(1 + TC1·(T − Nominal) + TC2·(T − Nominal)²)
//
// TC1 in 1/K, TC2 in 1/K². It is exact when the curve is a quadratic of R over
// its whole range, otherwise a least-squares fit that is right at the nominal
// temperature, with its largest error.
type Line struct {
	Nominal  float64 // K
	TC1, TC2 float64
	Exact    bool
	Lo, Hi   float64 // K, the window of the fit
	Error    float64 // relative, the largest over the window
	ErrorAt  float64 // K
	Over     float64 // R(Nominal)/R(reference of the data set)
	Curve    curve.Curve
}

// Simulator makes the line of the adopted set about nominal over [lo, hi] (K);
// lo = hi = 0 is the whole valid range. It refuses a nominal temperature outside
// the valid range, and a material whose R(T) is not known.
func Simulator(r *material.Record, nominal, lo, hi float64) (Line, error) {
	set := r.Adopted
	if set == nil || !set.Ratio.HasNominal() {
		return Line{}, fmt.Errorf("%s tells no nominal curve of R", r.ID)
	}
	if !set.Valid.Contains(nominal) {
		return Line{}, fmt.Errorf("the nominal temperature %s lies outside the valid range %s to %s of %s",
			quantity.CelsiusText(nominal), quantity.CelsiusText(set.Valid.Lo), quantity.CelsiusText(set.Valid.Hi), r.ID)
	}
	if lo == 0 && hi == 0 {
		lo, hi = set.Valid.Lo, set.Valid.Hi
	}
	if !set.Valid.Contains(lo) || !set.Valid.Contains(hi) || !(lo < hi) {
		return Line{}, fmt.Errorf("the window %s to %s does not lie inside the valid range of %s", quantity.CelsiusText(lo), quantity.CelsiusText(hi), r.ID)
	}
	whole, ok := curve.Ratio(set.Ratio.Nominal, nominal)
	if !ok {
		return Line{}, fmt.Errorf("%s has no R at %s", r.ID, quantity.CelsiusText(nominal))
	}
	whole, err := whole.Clip(lo, hi)
	if err != nil {
		return Line{}, err
	}
	at, _ := set.Ratio.Nominal.At(nominal)
	l := Line{Nominal: nominal, Lo: lo, Hi: hi, Over: at, Curve: whole}
	if g := whole.Segments[0]; len(whole.Segments) == 1 && g.C[3] == 0 {
		d := nominal - g.Centre
		l.TC1, l.TC2, l.Exact = g.C[1]+float64(2*g.C[2]*d), g.C[2], true
		return l, nil
	}
	return l, l.fit()
}

// linePoints of a fit: dense, since what is fitted is a curve and not data.
const linePoints = 161

func (l *Line) fit() error {
	var points []fit.Point
	for i := range linePoints {
		t := math.Min(l.Lo+float64((l.Hi-l.Lo)*float64(i)/(linePoints-1)), l.Hi)
		if y, ok := l.Curve.At(t); ok {
			points = append(points, fit.Point{T: t, Y: y})
		}
	}
	r, err := fit.Polynomial(points, fit.Options{Reference: l.Nominal, Degree: 2, Hold: true, Held: 1})
	if err != nil {
		return err
	}
	l.TC1, l.TC2 = r.B[1], r.B[2]
	l.Error, l.ErrorAt = l.largest()
	return nil
}

// largest is the exact largest difference of the curve from the quadratic.
func (l *Line) largest() (relative, at float64) {
	d := curve.Curve{Segments: append([]curve.Segment(nil), l.Curve.Segments...)}
	for i := range d.Segments {
		g := &d.Segments[i]
		x := g.Centre - l.Nominal
		g.C[0] -= 1 + float64(x*(l.TC1+float64(x*l.TC2)))
		g.C[1] -= l.TC1 + float64(2*x*l.TC2)
		g.C[2] -= l.TC2
	}
	e, _ := d.Extremes(l.Lo, l.Hi)
	if math.Abs(e.Min) > math.Abs(e.Max) {
		return e.Min, e.MinAt
	}
	return e.Max, e.MaxAt
}

// mostExpression is from how many segments on no expression is written: a
// table has one for each row, and such a line would help nobody.
const mostExpression = 24

// WriteSimulator writes the line with the identity of its numbers as comments.
func WriteSimulator(w *bytes.Buffer, lib *library.Library, r *material.Record, l Line) {
	name := symbol(r.ID)
	comment := func(text string) { w.WriteString("* " + plainASCII(text) + "\n") }
	for _, x := range identity(lib, r, r.Adopted) {
		comment(x[0] + ": " + x[1])
	}
	celsius := number(l.Nominal - quantity.ZeroCelsius)
	comment("R(T) of a fixed body over R at " + celsius + " degC; TC1 in 1/K, TC2 in 1/K2, not ppm; give R at " + celsius + " degC")
	comment("R at " + celsius + " degC is R at the reference temperature " + quantity.CelsiusText(r.Adopted.RatioReference) + " times " + number(l.Over))
	if l.Exact {
		comment("exact from " + quantity.CelsiusText(l.Lo) + " to " + quantity.CelsiusText(l.Hi) + ": the curve is a quadratic of R there")
	} else {
		comment("fitted over " + quantity.CelsiusText(l.Lo) + " to " + quantity.CelsiusText(l.Hi) + "; largest error " + quantity.PPMText(l.Error) + " ppm at " + quantity.Fixed(l.ErrorAt-quantity.ZeroCelsius, 0) + " degC")
	}
	fmt.Fprintf(w, ".model r_%s r (tc1=%s tc2=%s tnom=%s)\n", name, number(l.TC1), number(l.TC2), celsius)
	if l.Exact {
		return
	}
	if len(l.Curve.Segments) > mostExpression {
		comment("no expression is written: the curve has " + strconv.Itoa(len(l.Curve.Segments)) + " pieces; use the look-up table where the error above is too large")
		return
	}
	comment("the same without the error of a fit, R1 a b R='R0*f_" + name + "(temper)', products written out")
	w.WriteString(".func f_" + name + "(t) {" + expression(l.Curve) + "}\n")
}

// expression writes the segments as products, lowest first; beyond the last
// edge the last segment goes on.
func expression(c curve.Curve) string {
	var b bytes.Buffer
	last := len(c.Segments) - 1
	for i, g := range c.Segments {
		x := "(t-" + bracket(g.Centre-quantity.ZeroCelsius) + ")"
		p := bracket(g.C[0]) + "+" + x + "*(" + bracket(g.C[1]) + "+" + x + "*(" + bracket(g.C[2]) + "+" + x + "*" + bracket(g.C[3]) + "))"
		if i == last {
			b.WriteString("(" + p + ")")
			break
		}
		b.WriteString("(t<=" + number(g.To-quantity.ZeroCelsius) + " ? (" + p + ") : ")
	}
	for range last {
		b.WriteByte(')')
	}
	return b.String()
}

// bracket keeps a sign from meeting another one; 17 digits, since an
// expression is no table for people.
func bracket(x float64) string {
	s := strconv.FormatFloat(x, 'g', 17, 64)
	if x < 0 {
		return "(" + s + ")"
	}
	return s
}
