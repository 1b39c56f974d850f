package material

import (
	"math"
	"strings"
	"testing"

	"ohmfolio/generator/curve"
	"ohmfolio/generator/published"
)

// TestBlochAgainstTables fits amplitude and residual of the model (n = 5,
// Debye temperature of the resistivity as tabulated) to the published copper,
// silver and gold tables between 40 K and 300 K and states how far it is off.
// The reference's own fits leave 0.6 to 2.2 % rms; the model is an
// approximation, and a bound of 4 % rms holds it to the right curve.
func TestBlochAgainstTables(t *testing.T) {
	for _, c := range []struct {
		file, value, state string
		theta              float64 // own least-squares fit of the reference data, K
	}{
		{"matula1979_copper.csv", "rho_total_1e-8_ohm_m", "provenance_total", 334},
		{"matula1979_silver.csv", "rho_total_1e-8_ohm_m", "provenance", 232},
		{"matula1979_gold.csv", "rho_total_1e-8_ohm_m", "provenance", 190}, // from memory
		// Platinum's rows but for 273 and 293 K are quoted from memory in the
		// file: held all the same, and said so here.
		{"crc_platinum.csv", "rho_1e-8_ohm_m", "", 217},
	} {
		shape := curve.BlochGruneisen{Theta: c.theta, Amplitude: 1, Exponent: 5}
		var x, y []float64
		for _, row := range published.Rows(t, c.file) {
			at, v := published.Number(t, row["T_K"]), published.Number(t, row[c.value])
			if at >= 40 && at <= 300 && (c.state == "" || !strings.HasPrefix(row[c.state], "FROM MEMORY")) {
				x, y = append(x, shape.At(at)), append(y, v)
			}
		}
		amplitude, residual := relativeLine(x, y)
		sum, largest := 0.0, 0.0
		for i := range x {
			d := (amplitude*x[i]+residual)/y[i] - 1
			sum += d * d
			largest = math.Max(largest, math.Abs(d))
		}
		rms := math.Sqrt(sum / float64(len(x)))
		t.Logf("%s: %d rows, rms %.2f %%, largest %.2f %%", c.file, len(x), rms*100, largest*100)
		if len(x) < 6 || rms > 0.04 || largest > 0.10 {
			t.Errorf("%s: %d rows, rms %.3g, largest %.3g", c.file, len(x), rms, largest)
		}
	}
}

// relativeLine fits y = a·x + b with relative weights 1/y².
func relativeLine(x, y []float64) (a, b float64) {
	var sxx, sx, s, sxy, sy float64
	for i := range x {
		w := 1 / (y[i] * y[i])
		sxx, sx, s = sxx+w*x[i]*x[i], sx+w*x[i], s+w
		sxy, sy = sxy+w*x[i]*y[i], sy+w*y[i]
	}
	d := s*sxx - sx*sx
	return (s*sxy - sx*sy) / d, (sxx*sy - sx*sxy) / d
}
