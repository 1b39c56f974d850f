package export

import (
	"bytes"
	"fmt"
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// Simulator writes a material for circuit simulators: a resistor model with
// TC1, TC2 and TNOM, and the curve itself as an expression where it is not a
// parabola. The nominal temperature is 27 °C unless the order says otherwise.
func Simulator(w *bytes.Buffer, lib *library.Library, r *material.Record, o Order) error {
	t, err := o.take(r, simulatorNominal)
	if err != nil {
		return err
	}
	p := t.parabolaOf()
	name := word(r.ID)
	w.WriteString("* Resistance over temperature, for circuit simulators\n")
	writeComments(w, "* ", identity(lib, r, t.set), plain)
	fmt.Fprintf(w, "* quantity: resistance of a fixed body; see the notes, if any\n")
	fmt.Fprintf(w, "* nominal temperature: %s, written as tnom, whatever the simulator takes for its own\n", degrees(t.nominal))
	fmt.Fprintf(w, "* base value: the ohms at %s; they are %s times those at %s\n", degrees(t.nominal), number(t.scale), degrees(t.set.RatioReference))
	w.WriteString("* letters after a number: m and M both mean thousandths here, meg means millions\n")
	fmt.Fprintf(w, "* outside the valid range: the simulator goes on without a word; do not use\n*\n")
	t.writeModel(w, name, p)
	if !p.exact {
		t.writeExpression(w, name)
	}
	return nil
}

// writeModel writes the parabola; coefficients in 1/K and 1/K2.
func (t *task) writeModel(w *bytes.Buffer, name string, p parabola) {
	window := degrees(t.lo) + " to " + degrees(t.hi)
	if p.exact {
		fmt.Fprintf(w, "* the model is the curve itself over %s\n", window)
	} else {
		fmt.Fprintf(w, "* the model is a least-squares fit over %s, exact at %s\n", window, degrees(t.nominal))
		fmt.Fprintf(w, "* largest error of the fit: %s ppm of the base value, at %s\n", ppmUp(p.worst), degrees(p.worstAt))
	}
	fmt.Fprintf(w, "* example: r1 a b 0.25 %s\n", name)
	fmt.Fprintf(w, ".model %s r (tc1=%s tc2=%s tnom=%s)\n", name, number(p.tc1), number(p.tc2), number(t.nominal-quantity.ZeroCelsius))
}

// ppmUp prints a relative error in ppm to three digits, rounded up.
func ppmUp(x float64) string {
	x *= 1e6
	if !(x > 0) {
		return "0"
	}
	place := math.Pow(10, math.Floor(math.Log10(x))-2)
	return number(math.Ceil(x/place-1e-9) * place)
}

// writeExpression writes the curve as a sum of cubic pieces, each of them held
// at its ends and made of products: a power of a negative number is not the
// same in all simulators, and min and max are.
func (t *task) writeExpression(w *bytes.Buffer, name string) {
	fmt.Fprintf(w, "*\n* the curve itself, as an expression over the whole valid range; at the ends it holds its value\n")
	fmt.Fprintf(w, "* temper is the temperature of the circuit in degC, without what is set for one part alone (dtemp, temp)\n")
	fmt.Fprintf(w, "* where a simulator names it otherwise, change it in the line that begins with r1\n")
	fmt.Fprintf(w, "* example: x1 a b %s_curve base=0.25\n", name)
	fmt.Fprintf(w, ".subckt %s_curve a b base=1\n", name)
	fmt.Fprintf(w, ".func %s_held(t,lo,hi) {min(max(t,(lo)),(hi))-(lo)}\n", name)
	fmt.Fprintf(w, ".func %s_cubic(u,c1,c2,c3) {(u)*((c1)+(u)*((c2)+(u)*(c3)))}\n", name)
	segments := t.ratio.Segments
	fmt.Fprintf(w, ".func %s_ratio(t) {%s", name, number(valueOf(&segments[0], segments[0].From)))
	for i := range segments {
		s := &segments[i]
		if i > 0 {
			writeStep(w, &segments[i-1], s)
		}
		fmt.Fprintf(w, "\n+ +%s_cubic(%s_held(t,%s,%s),%s,%s,%s)", name, name,
			number(s.From-quantity.ZeroCelsius), number(s.To-quantity.ZeroCelsius), number(first(s, s.From)), number(second(s, s.From)/2), number(s.C[3]))
	}
	fmt.Fprintf(w, "}\nr1 a b r={base*%s_ratio(temper)}\n.ends\n", name)
}

// writeStep writes the step of two pieces that join with one.
func writeStep(w *bytes.Buffer, below, above *curve.Segment) {
	step := valueOf(above, above.From) - valueOf(below, below.To)
	if math.Abs(step) > 1e-11 {
		fmt.Fprintf(w, "\n+ +(t > %s ? %s : 0)", number(below.To-quantity.ZeroCelsius), number(step))
	}
}
