package export

import (
	"errors"
	"fmt"
	"math"

	"ohmfolio/generator/quantity"
)

// lookup is a table of R/R(nominal) − 1 in whole counts at even steps of whole
// thousandths of a degree Celsius.
type lookup struct {
	task
	first, stepM int64   // thousandths of a degree: °C of the first row, step
	counts       []int32 // by row
	ppm          float64 // what one count is
	bound        float64 // proven distance of the straight line between two rows from the curve, in counts
}

// half is what rounding a row to whole counts may cost, in counts; the line
// between two rounded rows is off by no more.
const half = 0.5

// sizes are the sizes of a count in ppm that are tried, finest first. The last
// is so large that a table is always found.
var sizes = []float64{1, 2, 5, 10, 20, 50, 100, 200, 500, 1e3, 2e3, 5e3, 1e4, 2e4, 5e4, 1e5, 1e6, 1e9, 1e12}

// mostRows is how long a chosen table may be: 512 rows of 32 bits are 2 KB.
const mostRows = 512

// mostOrderedRows is how long a table may be whose step was asked for.
const mostOrderedRows = 1 << 16

// lookupOf chooses the table: the finest count and then the longest step for
// which the straight line between two rows, rounding of the rows included, is
// proven to stay within one count of the curve.
func (t task) lookupOf() (*lookup, error) {
	l := &lookup{task: t}
	l.first = int64(math.Ceil((t.lo-quantity.ZeroCelsius)*1000 - 1e-6))
	last := int64(math.Floor((t.hi-quantity.ZeroCelsius)*1000 + 1e-6))
	span := last - l.first
	if t.step > 0 {
		return l, l.ordered(span)
	}
	steps := evenSteps(span)
	for _, l.ppm = range sizes {
		for _, l.stepM = range steps {
			if l.proven(span) && l.fill(span) {
				return l, nil
			}
		}
	}
	return nil, errors.New("the curve is not finite")
}

// evenSteps lists the steps that divide the span into at most mostRows−1
// parts, longest first. A span with few divisors also gets steps that leave
// less than a step over at its upper end.
func evenSteps(span int64) []int64 {
	var even, odd []int64
	for n := int64(1); n < mostRows && n <= span; n++ {
		if span%n == 0 {
			even = append(even, span/n)
		} else if n&(n-1) == 0 {
			odd = append(odd, span/n)
		}
	}
	if len(even) < 8 {
		return odd
	}
	return even
}

// ordered takes the step that was asked for and the finest count that it bears.
func (l *lookup) ordered(span int64) error {
	l.stepM = int64(math.Round(l.step * 1000))
	if l.stepM < 1 || math.Abs(float64(l.stepM)-l.step*1000) > 1e-6 {
		return errors.New("the step is not a whole number of thousandths of a kelvin")
	}
	if l.stepM > span || span/l.stepM >= mostOrderedRows {
		return fmt.Errorf("the step gives %d rows; ask for 2 to %d", span/l.stepM+1, mostOrderedRows)
	}
	for _, l.ppm = range sizes {
		if l.proven(span) && l.fill(span) {
			return nil
		}
	}
	return errors.New("the curve is not finite")
}

// kelvin is the temperature of a row.
func (l *lookup) kelvin(row int64) float64 {
	return quantity.ZeroCelsius + float64(l.first+row*l.stepM)/1000
}

// proven tells whether no interval may be off by a count, and keeps the bound.
func (l *lookup) proven(span int64) bool {
	count := float64(l.ppm * 1e-6)
	l.bound = half
	at, from := 0, l.kelvin(0)
	for row := int64(1); row <= span/l.stepM; row++ {
		to := l.kelvin(row)
		var b float64
		b, at = chordBound(l.ratio, from, to, at)
		if b = half + b/count; !(b < 1) {
			return false
		}
		l.bound, from = math.Max(l.bound, b), to
	}
	return true
}

// fill computes the rows; false when 32 bits do not hold one of them.
func (l *lookup) fill(span int64) bool {
	l.counts = make([]int32, span/l.stepM+1)
	for i := range l.counts {
		v, ok := l.ratio.At(l.kelvin(int64(i)))
		c := math.RoundToEven((quantity.Round12(v) - 1) / float64(l.ppm*1e-6))
		if !ok || !(math.Abs(c) <= math.MaxInt32) {
			return false
		}
		l.counts[i] = int32(c)
	}
	return true
}

// bits is the width of integer that holds every row.
func (l *lookup) bits() int {
	for _, c := range l.counts {
		if c > math.MaxInt16 || c < math.MinInt16 {
			return 32
		}
	}
	return 16
}

// productFits tells whether difference of two rows times remainder fits 32 bits.
func (l *lookup) productFits() bool {
	for i := 1; i < len(l.counts); i++ {
		d := int64(l.counts[i]) - int64(l.counts[i-1])
		if max(d, -d)*l.stepM > math.MaxInt32 {
			return false
		}
	}
	return true
}

// uncovered is what the even steps leave over of the window, in thousandths.
func (l *lookup) uncovered() int64 {
	return int64(math.Floor((l.hi-quantity.ZeroCelsius)*1000+1e-6)) - l.first - int64(len(l.counts)-1)*l.stepM
}
