package study

import (
	"math"

	"ohmfolio/generator/quantity"
)

// cooled is a winding's resistance after switch-off:
//
//	R(t) = end + above·exp(−t/τ)
type cooled struct{ end, above, tau float64 }

func (c cooled) at(t float64) float64 { return c.end + float64(c.above*math.Exp(-t/c.tau)) }

// extrapolate fits the readings. The exponential finds its own end; the
// straight line on log takes the resistance at the coolant's temperature for it.
func (x *wound) extrapolate() (cooled, string) {
	if x.g.text("extrapolation", exponential) == exponential {
		return x.g.fitted, x.g.unfit
	}
	end := x.g.r1.over(x.law.factor(x.g.t1)).times(x.law.factor(x.g.coolant)).v
	if math.IsNaN(end) {
		return cooled{}, x.law.why(x.g.coolant.v)
	}
	return fitLogarithm(x.g.readings, end)
}

// fitLogarithm puts the least-squares line through ln(R − end) over t.
func fitLogarithm(list []reading, end float64) (cooled, string) {
	var n, st, sy, stt, sty float64
	for _, p := range list {
		if !(p.r > end) {
			return cooled{}, "a reading lies below the resistance at the coolant's temperature"
		}
		y := math.Log(p.r - end)
		n, st, sy, stt, sty = n+1, st+p.t, sy+y, stt+float64(p.t*p.t), sty+float64(p.t*y)
	}
	slope := (float64(n*sty) - float64(st*sy)) / (float64(n*stt) - float64(st*st))
	if !(slope < 0) {
		return cooled{}, "the readings do not fall towards the coolant's temperature"
	}
	return cooled{end, math.Exp((sy - float64(slope*st)) / n), -1 / slope}, ""
}

// fitExponential finds τ by golden section on the sum of squares, end and
// above by linear least squares for each τ.
func fitExponential(list []reading) (cooled, string) {
	span := list[len(list)-1].t - list[0].t
	lo, hi := math.Log(span/50), math.Log(span*50)
	const steps = 60
	best := lo
	sum := func(logTau float64) float64 { _, s := linearPart(list, math.Exp(logTau)); return s }
	for i := range steps + 1 {
		if l := lo + float64((hi-lo)*float64(i)/steps); sum(l) < sum(best) {
			best = l
		}
	}
	step := (hi - lo) / steps
	if best-lo < step/2 || hi-best < step/2 {
		return cooled{}, "the readings do not bend like an exponential: no extrapolation to switch-off"
	}
	tau := math.Exp(golden(best-step, best+step, sum))
	c, _ := linearPart(list, tau)
	if !(c.above > 0) {
		return cooled{}, "the readings do not fall like an exponential: no extrapolation to switch-off"
	}
	return c, ""
}

// linearPart gives end and above for a given τ, and the sum of squares left.
func linearPart(list []reading, tau float64) (cooled, float64) {
	var n, se, sr, see, ser float64
	for _, p := range list {
		e := math.Exp(-p.t / tau)
		n, se, sr, see, ser = n+1, se+e, sr+p.r, see+float64(e*e), ser+float64(e*p.r)
	}
	above := (float64(n*ser) - float64(se*sr)) / (float64(n*see) - float64(se*se))
	c := cooled{(sr - float64(above*se)) / n, above, tau}
	return c, c.squares(list)
}

func (c cooled) squares(list []reading) float64 {
	sum := 0.0
	for _, p := range list {
		d := p.r - c.at(p.t)
		sum += float64(d * d)
	}
	return sum
}

// golden finds the least value of f, which has one valley in [a, b].
func golden(a, b float64, f func(float64) float64) float64 {
	g := (math.Sqrt(5) - 1) / 2
	x, y := b-float64(g*(b-a)), a+float64(g*(b-a))
	fx, fy := f(x), f(y)
	for b-a > 1e-12 {
		if fx < fy {
			b, y, fy = y, x, fx
			x = b - float64(g*(b-a))
			fx = f(x)
		} else {
			a, x, fx = x, y, fy
			y = a + float64(g*(b-a))
			fy = f(y)
		}
	}
	return a + (b-a)/2
}

// table shows the readings against the fit, switch-off first.
func (c cooled) table(list []reading) Table {
	t := Table{Caption: "Readings and the curve through them, time constant " + quantity.Number(c.tau, 3) + quantity.NarrowSpace + "s",
		Heads: []string{"after switch-off, s", "read, Ω", "curve, Ω", "read less curve, ppm"}}
	t.Rows = append(t.Rows, []string{"0", "extrapolated", quantity.Number(c.at(0), 5), "—"})
	for _, p := range list {
		t.Rows = append(t.Rows, []string{quantity.Number(p.t, 3), quantity.Number(p.r, 5), quantity.Number(c.at(p.t), 5), quantity.Fixed((p.r/c.at(p.t)-1)*1e6, 0)})
	}
	return t
}

// drawn adds the figure of the cooling curve.
func (x *wound) drawn(c cooled) {
	if len(x.g.out.Charts) > 0 {
		return // one figure is enough: the readings are the same
	}
	last := x.g.readings[len(x.g.readings)-1].t
	fit, read := Series{Label: "curve to switch-off"}, Series{Label: "readings", Apart: true}
	for i := range seriesPoints {
		t := float64(last * float64(i) / (seriesPoints - 1))
		fit.X, fit.Y = append(fit.X, t), append(fit.Y, c.at(t))
	}
	for _, p := range x.g.readings {
		read.X, read.Y = append(read.X, p.t), append(read.Y, p.r)
	}
	x.g.out.Charts = append(x.g.out.Charts, Chart{Title: "Cooling after switch-off", XTitle: "time in s", YTitle: "R in Ω",
		Description: "Resistance of the winding after switch-off, the readings and the curve through them, extrapolated to switch-off.",
		Series:      []Series{fit, read}})
}

// tables: the numbers; R over temperature; what another constant would make of it.
func (g *winding) tables(answers []*answer) {
	tables := g.numbersTables("The winding", answers, "length", "mass", "fill", "resistance_20", "against_computed", "resistance_hot", "temperature", "rise", "zero_resistance_temperature")
	if t := g.constants(answers); len(t.Rows) > 1 {
		tables = append(tables, t)
	}
	if g.fitted.tau > 0 {
		tables = append(tables, g.fitted.table(g.readings))
	}
	if t, asked := g.requirementsTable(answers); asked {
		tables = append(tables, t)
	}
	g.out.Tables = append(g.out.Tables, tables...)
}

// constants tells the rise by each constant of the same metal.
func (g *winding) constants(answers []*answer) Table {
	t := Table{Caption: "What the constant makes of the same readings", Heads: []string{"material", "constant", "average temperature, °C", "rise, K"}}
	for i, a := range answers {
		set := a.Record.Adopted
		hot, ok := a.spans["resistance_hot"]
		if set == nil || !ok || i >= widest || !math.IsNaN(g.class) || !(g.r2.known() || len(g.readings) > 0) {
			continue
		}
		for _, constant := range []string{ownConstant, "234.5", "235", "225", "228"} {
			other := winding{constant: constant, conductivity: g.conductivity}
			l := other.lawOf(set)
			if off := math.Abs(l.zero().v - l.ownZero()); !(off <= otherMetal) {
				continue
			}
			row := []string{a.Label(), constant, string(CannotBeTold), string(CannotBeTold)}
			if v := l.temperature(nominal(hot.v/g.r1.v), nominal(g.t1.v)).v; !math.IsNaN(v) {
				row[2] = quantity.Fixed(v-quantity.ZeroCelsius, 2)
				if g.coolant.known() {
					row[3] = quantity.Fixed(v-g.coolant.v, 2)
				}
			}
			t.Rows, t.Links = append(t.Rows, row), append(t.Links, a.Material)
		}
	}
	return t
}
