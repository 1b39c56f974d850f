package export

import (
	"math"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/quantity"
)

// parabola is R/R(nominal) = 1 + tc1·d + tc2·d², d = T − nominal, as circuit
// simulators compute it: K⁻¹ and K⁻², never ppm.
type parabola struct {
	tc1, tc2 float64
	exact    bool    // the curve is this parabola
	worst    float64 // largest distance from the curve over the window, of R(nominal)
	worstAt  float64 // K
}

// exactness is the distance up to which a curve counts as its parabola: what
// rounding to 12 digits leaves.
const exactness = 1e-11

// parabolaOf is exact where the curve is one parabola,
//
//	TC1 = R′/R, TC2 = R″/2R at the nominal temperature,
//
// and otherwise the least-squares fit over the window with R(nominal) held.
func (t *task) parabolaOf() parabola {
	p := parabola{exact: true}
	for i := range t.ratio.Segments {
		if s := &t.ratio.Segments[i]; s.To >= t.nominal || i == len(t.ratio.Segments)-1 {
			p.tc1, p.tc2 = quantity.Round12(first(s, t.nominal)), quantity.Round12(second(s, t.nominal)/2)
			break
		}
	}
	if t.judge(&p); p.worst <= exactness {
		return p
	}
	p = t.fitted()
	t.judge(&p)
	return p
}

// judge finds the largest distance between curve and parabola. It is exact:
// the difference is cubic on every segment.
func (t *task) judge(p *parabola) {
	off := curve.Curve{Segments: make([]curve.Segment, len(t.ratio.Segments))}
	for i, s := range t.ratio.Segments {
		e := s.Centre - t.nominal
		s.C[0] -= 1 + float64(e*(p.tc1+float64(e*p.tc2)))
		s.C[1] -= p.tc1 + float64(2*p.tc2*e)
		s.C[2] -= p.tc2
		off.Segments[i] = s
	}
	e, _ := off.Extremes(t.lo, t.hi)
	if p.worst, p.worstAt = math.Abs(e.Max), e.MaxAt; -e.Min > p.worst {
		p.worst, p.worstAt = -e.Min, e.MinAt
	}
}

// fitted minimises ∫(R/R(nominal) − 1 − a·x − b·x²)² over the window, x being
// the distance from nominal over its largest. The integrands are of the fifth
// power on every segment, for which three points of Gauss are exact.
func (t *task) fitted() parabola {
	length := math.Max(math.Abs(t.lo-t.nominal), math.Abs(t.hi-t.nominal))
	a, b := (t.lo-t.nominal)/length, (t.hi-t.nominal)/length
	moment := func(k float64) float64 { return (math.Pow(b, k+1) - math.Pow(a, k+1)) / (k + 1) }
	m2, m3, m4 := moment(2), moment(3), moment(4)
	var f1, f2 float64
	for i := range t.ratio.Segments {
		s := &t.ratio.Segments[i]
		from, to := math.Max(s.From, t.lo), math.Min(s.To, t.hi)
		if from >= to {
			continue
		}
		for _, g := range gauss3 {
			at := (from+to)/2 + float64(g.x*(to-from)/2)
			x := (at - t.nominal) / length
			y := float64((valueOf(s, at) - 1) * float64(g.w*(to-from)/(2*length)))
			f1 += float64(y * x)
			f2 += float64(y * float64(x*x))
		}
	}
	d := float64(m2*m4) - float64(m3*m3)
	c1 := (float64(f1*m4) - float64(f2*m3)) / d
	c2 := (float64(f2*m2) - float64(f1*m3)) / d
	return parabola{tc1: quantity.Round12(c1 / length), tc2: quantity.Round12(c2 / float64(length*length))}
}

// gauss3 are abscissae and weights of the three-point rule of Gauss.
var gauss3 = [3]struct{ x, w float64 }{{-math.Sqrt(0.6), 5. / 9}, {0, 8. / 9}, {math.Sqrt(0.6), 5. / 9}}
