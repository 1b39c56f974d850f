package curve

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"ohmfolio/generator/published"
)

// TestTableAgreesWithScipy holds value and slope of the monotone cubic against
// scipy.interpolate.PchipInterpolator (Debian python3-scipy).
func TestTableAgreesWithScipy(t *testing.T) {
	random := rand.New(rand.NewPCG(6, 1))
	for range 5 {
		x, y := randomTable(random)
		for len(x) < 3 { // scipy draws two rows otherwise, and says so
			x, y = randomTable(random)
		}
		curve := must(t)(Table(x, y, false))
		var at []float64
		for i := range 30 {
			at = append(at, math.Min(x[0]+(x[len(x)-1]-x[0])*float64(i)/29, x[len(x)-1]))
		}
		lines := published.Scipy(t, fmt.Sprintf("p = scipy.interpolate.PchipInterpolator([%s], [%s])\nq = np.array([%s])\ntell(p(q))\ntell(p.derivative()(q))\n",
			published.List(x), published.List(y), published.List(at)))
		span, size := x[len(x)-1]-x[0], 0.0
		for _, v := range y {
			size = math.Max(size, math.Abs(v))
		}
		for i, q := range at {
			v, _ := curve.At(q)
			slope, _ := curve.Slope(q)
			near(t, "value", v, lines[0][i], 1e-13*size)
			near(t, "slope", slope, lines[1][i], 1e-10*size/span*float64(len(x)))
		}
	}
}
