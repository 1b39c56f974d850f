package curve

import (
	"math"
	"testing"

	"ohmfolio/generator/published"
)

// Source: quadratic vectors computed independently in double precision (derived).
func TestQuadraticVectors(t *testing.T) {
	for _, row := range published.Rows(t, "quadratic_vectors.csv") {
		id := row["id"]
		p := Polynomial{Y0: 1, Alpha: published.Number(t, row["alpha_1e-6/K"]) * 1e-6, Beta: published.Number(t, row["beta_1e-6/K2"]) * 1e-6,
			Reference: c(published.Number(t, row["T0_C"]))}
		q := p.Rereference(c(published.Number(t, row["T1_C"])))
		near(t, id+" ratio", q.Y0, published.Number(t, row["R_T1_over_R_T0"]), 1e-12)
		near(t, id+" α", q.Alpha*1e6, published.Number(t, row["alpha_T1_1e-6/K"]), 2e-9)
		near(t, id+" β", q.Beta*1e6, published.Number(t, row["beta_T1_1e-6/K2"]), 2e-9)
		if row["peak_T_C"] == "" {
			continue
		}
		peak := c(published.Number(t, row["peak_T_C"]))
		curve := p.Curve(peak-500, peak+500)
		points := curve.TurningPoints()
		if len(points) != 1 || points[0].Maximum != (p.Beta < 0) {
			t.Fatalf("%s: turning points %v", id, points)
		}
		near(t, id+" peak at", points[0].T, peak, 1e-6)
		near(t, id+" peak", at(t, curve, points[0].T), published.Number(t, row["R_peak_over_R_T0"]), 1e-12)
	}
}

// Source: NBS Handbook 100 (1966), copper of several conductivities; from
// memory, reproduced by the handbook's formula. α at 20 °C is n·0.00393.
func TestCopperAtOtherReferenceTemperatures(t *testing.T) {
	entries := 0
	for _, row := range published.Rows(t, "nbs_copper_alpha_vs_conductivity.csv") {
		alpha20 := published.Number(t, row["percent_IACS"]) / 100 * 0.00393
		p := Polynomial{Y0: 1, Alpha: alpha20, Reference: c(20)}
		for _, ref := range []string{"0", "15", "20", "25", "30", "50"} {
			got := p.Rereference(c(published.Number(t, ref))).Alpha
			printed, calculated := row["alpha_"+ref+"C_printed_memory"], row["alpha_"+ref+"C_calc"]
			near(t, row["percent_IACS"]+" % at "+ref+" °C, printed", got, published.Number(t, printed), halfUnit(printed)*1.0001)
			near(t, row["percent_IACS"]+" % at "+ref+" °C, calculated", got, published.Number(t, calculated), halfUnit(calculated)*1.0001)
			entries++
		}
		zero := c(20) - 1/alpha20 // where the straight line is zero
		near(t, row["percent_IACS"]+" % zero", -(zero - zeroCelsius), published.Number(t, row["T_calc"]), 0.0006)
	}
	if entries < 30 {
		t.Errorf("only %d entries were compared", entries)
	}
}

// Check numbers computed by hand from the formulas (copper standard, α = 0.00393 at 20 °C).
func TestCopperCheckNumbers(t *testing.T) {
	copper := Polynomial{Y0: 1, Alpha: 0.00393, Reference: c(20)}
	zero := copper.Rereference(c(0)).Alpha
	near(t, "α at 0 °C", zero, 0.0042652, 5e-8)
	near(t, "α at 25 °C", copper.Rereference(c(25)).Alpha, 0.0038543, 5e-8)
	right := copper.Curve(c(-50), c(200))
	wrong := Polynomial{Y0: 1, Alpha: zero, Reference: c(20)}.Curve(c(-50), c(200))
	near(t, "zero-°C α used from 20 °C", at(t, wrong, c(100))/at(t, right, c(100))-1, 0.0204, 5e-5)
	fromZero := copper.Rereference(c(0))
	fromZero.Alpha = 0.00393
	near(t, "20 °C α used from 0 °C", fromZero.At(c(100))/copper.At(c(100))-1, -0.0235, 5e-5)
	near(t, "read at 25 °C against 20 °C", at(t, right, c(25))-1, 0.0197, 5.001e-5) // 1.965 %, a tie
}

// Check numbers computed by hand: α +10 ppm/K, β −0.5 ppm/K² about 20 °C.
func TestWorkedParabola(t *testing.T) {
	curve := worked.Curve(c(-55), c(125))
	for celsius, ppm := range map[float64]float64{-40: -2400, 60: -400, 85: -1462.5, 105: -2762.5, 125: -4462.5} {
		near(t, "change", (at(t, curve, c(celsius))-1)*1e6, ppm, 1e-8)
	}
	at25 := worked.Rereference(c(25))
	near(t, "α at 25 °C", at25.Alpha*1e6, 5.000, 5e-4)
	near(t, "β at 25 °C", at25.Beta*1e6, -0.500, 5e-4)
	near(t, "α at 60 °C", worked.Rereference(c(60)).Alpha*1e6, -30.0, 0.05)
	left := worked
	left.Reference = c(27) // a nominal temperature left at 27 °C
	near(t, "nominal left at 27 °C, at 105 °C", (left.At(c(105))-1)*1e6, -2262, 1e-8)
}

// The published cubic of a copper at 293 K, read in a transcription
// (Chaboudez et al. 1994, last exponent inferred): 1.6778461e-8 Ω·m.
func TestPublishedCubic(t *testing.T) {
	p := Polynomial{Y0: -3.033e-9, Alpha: 68.85e-12 / -3.033e-9, Beta: -6.72e-15 / -3.033e-9, Gamma: 8.56e-18 / -3.033e-9}
	near(t, "ρ at 293 K", at(t, p.Curve(100, 1000), 293), 1.6778461e-8, 5e-16)
	q := p.Rereference(293)
	near(t, "about 293 K", q.At(700), p.At(700), 1e-15*math.Abs(p.At(700))*8)
}

func TestRereferenceOfNothing(t *testing.T) {
	if q := worked.Rereference(worked.Reference); q != worked {
		t.Errorf("to its own reference temperature: got %v", q)
	}
	level := Polynomial{Y0: 2, Reference: 293}.Rereference(400)
	if level.Y0 != 2 || level.Alpha != 0 || level.Beta != 0 || level.Gamma != 0 {
		t.Errorf("a level one: got %v", level)
	}
	gone := Polynomial{Y0: 1, Alpha: -0.01, Reference: 300}.Rereference(400) // 1 − 0.01·100 = 0
	if !math.IsInf(gone.Alpha, -1) {
		t.Errorf("where the polynomial is zero α has no value: got %v", gone.Alpha)
	}
}

func TestNoCurveFromWhatIsNotFinite(t *testing.T) {
	for _, p := range []Polynomial{
		{Y0: math.NaN(), Reference: 293}, {Y0: 1, Alpha: math.NaN(), Reference: 293},
		{Y0: 1, Gamma: math.Inf(1), Reference: 293}, {Y0: 1, Reference: math.NaN()},
	} {
		if n := len(p.Curve(200, 300).Segments); n != 0 {
			t.Errorf("%v gave %d segments", p, n)
		}
	}
	if n := len(worked.Curve(300, 200).Segments); n != 0 {
		t.Error("an inverted range gave a curve")
	}
}
