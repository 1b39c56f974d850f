package command

import (
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"

	"ohmfolio/generator/fit"
	"ohmfolio/generator/quantity"
)

// fitJSON is the result of the fit command; the names are a contract.
type fitJSON struct {
	Reference    float64           `json:"reference_C"`
	Degree       int               `json:"degree"`
	N            int               `json:"n"`
	Dof          int               `json:"dof"`
	Coefficients []coefficientJSON `json:"coefficients"`
	Covariance   [][]float64       `json:"covariance"`
	Correlation  [][]float64       `json:"correlation"`
	ResidualSD   float64           `json:"residual_sd"`
	ChiSquare    *float64          `json:"chi_square_over_nu"`
	RSquared     *float64          `json:"r_squared"`
	LackOfFit    *lackJSON         `json:"lack_of_fit"`
	LargestPPM   *float64          `json:"largest_residual_ppm"`
	Outliers     []outlierJSON     `json:"outliers"`
	Common       []commonJSON      `json:"common"`
	Warnings     []string          `json:"warnings"`
}

type coefficientJSON struct {
	Name  string  `json:"name"`
	Value float64 `json:"value"`
	Unit  string  `json:"unit"`
	U     float64 `json:"standard_uncertainty"`
}

type lackJSON struct {
	F    float64 `json:"F"`
	Dof1 int     `json:"dof1"`
	Dof2 int     `json:"dof2"`
	P    float64 `json:"p"`
}

type outlierJSON struct {
	Line         int     `json:"line"`
	TemperatureC float64 `json:"temperature_C"`
	ResidualPPM  float64 `json:"residual_ppm"`
}

// commonJSON is one part that is common to all points, added after the fit.
type commonJSON struct {
	From string  `json:"from"` // thermometer, instrument
	To   string  `json:"to"`   // which coefficient
	U    float64 `json:"standard_uncertainty"`
	Unit string  `json:"unit"`
}

func finiteOrNil(x float64) *float64 {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	return &x
}

// baseJSON fills what raw and measured fits share.
func baseJSON(r fit.Result) fitJSON {
	j := fitJSON{Degree: r.Options.Degree, N: r.N, Dof: r.Dof, ResidualSD: r.SD, ChiSquare: finiteOrNil(r.ChiSquare), RSquared: finiteOrNil(r.RSquared),
		Outliers: []outlierJSON{}, Common: []commonJSON{}, Warnings: append([]string{}, r.Warnings...)}
	if l := r.LackOfFit; l != nil {
		j.LackOfFit = &lackJSON{l.F, l.Dof1, l.Dof2, l.P}
	}
	return j
}

func rawJSON(r fit.Result) fitJSON {
	j := baseJSON(r)
	j.Reference = r.Options.Reference
	from := 0
	if r.Options.Origin {
		from = 1
	}
	for k := from; k < len(r.B); k++ {
		j.Coefficients = append(j.Coefficients, coefficientJSON{Name: "b" + strconv.Itoa(k), Value: r.B[k], U: math.Sqrt(math.Max(0, r.Covariance[k][k]))})
	}
	for _, row := range r.Covariance[from:] {
		j.Covariance = append(j.Covariance, row[from:])
	}
	j.Correlation = fit.Correlation(j.Covariance)
	for _, i := range r.Outliers {
		j.Outliers = append(j.Outliers, outlierJSON{Line: i + 2})
	}
	return j
}

// measured is a fit of measured points with everything that is printed of it.
type measured struct {
	r            fit.Result
	points       []fit.Point
	header       fit.Header
	coefficients []fit.Coefficient
	covariance   [][]float64
	common       []commonJSON
	k            float64
}

func newMeasured(r fit.Result, points []fit.Point, h fit.Header, f fitFlags) (*measured, error) {
	list, covariance, ok := r.Relative()
	if !ok {
		return nil, wrong("the fitted value at the reference temperature is 0; there is no α")
	}
	m := &measured{r: r, points: points, header: h, coefficients: list, covariance: covariance}
	m.k = fit.CoverageFactor(math.Erf(2/math.Sqrt2), float64(max(1, r.Dof)))
	if err := m.thermometer(f.thermometer); err != nil {
		return nil, err
	}
	return m, m.instrument(f.instrument)
}

// thermometer adds what a temperature wrong by the same amount at every point
// does: the curve shifts, which re-references its coefficients.
func (m *measured) thermometer(text string) error {
	if text == "" {
		return nil
	}
	q, p := quantity.Parse(quantity.TemperatureDifference, text)
	if p != nil || !(q.Value > 0) {
		return fmt.Errorf("--thermometer takes a temperature difference such as \"0.02 K\", not %q", text)
	}
	moved := m.r.About(m.r.Options.Reference + q.Value)
	list, _, ok := moved.Relative()
	for i := range list {
		if ok {
			m.common = append(m.common, commonJSON{"thermometer", m.name(i), math.Abs(list[i].Value - m.coefficients[i].Value), m.unit(i)})
		}
	}
	return nil
}

// instrument adds a value wrong by the same share at every point: only the
// value at the reference temperature moves.
func (m *measured) instrument(text string) error {
	if text == "" {
		return nil
	}
	q, p := quantity.Parse(quantity.Ratio, text)
	if p != nil || !(q.Value > 0) {
		return fmt.Errorf("--instrument takes a share such as \"0.005 %%\", not %q", text)
	}
	m.common = append(m.common, commonJSON{"instrument", m.name(0), math.Abs(q.Value * m.coefficients[0].Value), m.unit(0)})
	return nil
}

func (m *measured) name(i int) string {
	if i == 0 {
		return string(m.header.Kind)
	}
	return m.coefficients[i].Name
}

func (m *measured) unit(i int) string {
	si := map[quantity.Kind]string{quantity.Resistance: "Ω", quantity.Resistivity: "Ω·m", quantity.Ratio: "1"}
	return [...]string{si[m.header.Kind], "1/K", "1/K²", "1/K³"}[i]
}

// total is the standard uncertainty of coefficient i with its common parts.
func (m *measured) total(i int) float64 {
	sum := m.coefficients[i].U * m.coefficients[i].U
	for _, c := range m.common {
		if c.To == m.name(i) {
			sum += c.U * c.U
		}
	}
	return math.Sqrt(sum)
}

func (m *measured) json() fitJSON {
	j := baseJSON(m.r)
	j.Reference = quantity.Round12(m.r.Options.Reference - quantity.ZeroCelsius)
	for i, c := range m.coefficients {
		j.Coefficients = append(j.Coefficients, coefficientJSON{m.name(i), c.Value, m.unit(i), c.U})
	}
	j.Covariance, j.Correlation = m.covariance, fit.Correlation(m.covariance)
	j.LargestPPM = finiteOrNil(m.r.LargestResidual())
	for _, i := range m.r.Outliers {
		j.Outliers = append(j.Outliers, m.outlier(i))
	}
	j.Common = append(j.Common, m.common...)
	return j
}

func (m *measured) outlier(i int) outlierJSON {
	return outlierJSON{m.points[i].Line, quantity.Round12(m.points[i].T - quantity.ZeroCelsius), m.r.Residuals[i] / m.r.B[0] * 1e6}
}

// scaled prints coefficient i in its trade unit with its expanded uncertainty:
// two digits, the value to the same place (JCGM 100, 7.2.6).
func (m *measured) scaled(i int) (value, expanded, unit string) {
	factor, unit := 1e6, [...]string{"", "ppm/K", "ppm/K²", "ppm/K³"}[i]
	if i == 0 {
		factor, unit = 1/m.header.ValueUnit.ToSI(1), m.header.ValueUnit.Symbol
	}
	u := m.total(i) * m.k * factor
	if !(u > 0) {
		return quantity.Number(m.coefficients[i].Value*factor, 6), "", unit
	}
	value, expanded, _ = quantity.RoundUncertainty(m.coefficients[i].Value*factor, u)
	return value, expanded, unit
}

func (m *measured) kText() string { return strconv.FormatFloat(m.k, 'f', 2, 64) }

func (m *measured) text(w io.Writer) {
	fmt.Fprintf(w, "%s about %s, degree %d, %d points, %d degrees of freedom\n", m.header.Kind, quantity.CelsiusText(m.r.Options.Reference), m.r.Options.Degree, m.r.N, m.r.Dof)
	for i := range m.coefficients {
		value, expanded, unit := m.scaled(i)
		if expanded == "" {
			fmt.Fprintf(w, "  %-12s %s %s, held or without scatter\n", m.name(i), value, unit)
			continue
		}
		fmt.Fprintf(w, "  %-12s %s %s ± %s %s (k=%s)\n", m.name(i), value, unit, expanded, unit, m.kText())
	}
	for _, c := range m.common {
		fmt.Fprintf(w, "  common to all points, %s: u(%s) = %.2g %s, included above\n", c.From, c.To, c.U, c.Unit)
	}
	fmt.Fprintf(w, "  residual standard deviation %.3g ppm, largest residual %.3g ppm, R² %.6f\n", m.r.Scatter()/m.r.B[0]*1e6, m.r.LargestResidual(), m.r.RSquared)
	if !math.IsNaN(m.r.ChiSquare) {
		fmt.Fprintf(w, "  χ²/ν %.3g\n", m.r.ChiSquare)
	}
	if l := m.r.LackOfFit; l != nil {
		fmt.Fprintf(w, "  lack of fit: F(%d, %d) = %.3g, p = %.3g\n", l.Dof1, l.Dof2, l.F, l.P)
	}
	for _, i := range m.r.Outliers {
		o := m.outlier(i)
		fmt.Fprintf(w, "  outlier (kept): line %d, %s °C, residual %.3g ppm\n", o.Line, quantity.KelvinText(o.TemperatureC), o.ResidualPPM)
	}
	fmt.Fprint(w, warningsText(m.r.Warnings))
}

// yaml writes a data set ready to paste; what only a person knows is left to
// be filled in.
func (m *measured) yaml(w io.Writer) {
	lo, hi := math.Inf(1), math.Inf(-1)
	for _, p := range m.points {
		lo, hi = math.Min(lo, p.T), math.Max(hi, p.T)
	}
	fmt.Fprintf(w, "  measured:\n    source: SOURCE-ID\n    class: measured\n    condition: CONDITION\n    basis: resistance\n    temperature_scale: ITS-90\n")
	for i := range m.coefficients {
		key := [...]string{"resistivity", "alpha", "beta", "gamma"}[i]
		if i == 0 && m.header.Kind != quantity.Resistivity {
			continue
		}
		value, expanded, unit := m.scaled(i)
		line := value + " " + unit
		if expanded != "" {
			line += " ± " + expanded + " " + unit + " (k=" + m.kText() + ")"
		}
		fmt.Fprintf(w, "    %s: %s\n", key, strings.ReplaceAll(line, "−", "-"))
	}
	fmt.Fprintf(w, "    reference_temperature: %s °C\n    valid_range: %s °C to %s °C\n", ascii(m.r.Options.Reference), ascii(lo), ascii(hi))
}

func ascii(kelvin float64) string {
	return strings.ReplaceAll(quantity.DegreesText(kelvin), "−", "-")
}
