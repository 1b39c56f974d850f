package command

import (
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"ohmfolio/generator/columns"
	"ohmfolio/generator/fit"
	"ohmfolio/generator/place"
	"ohmfolio/generator/quantity"
)

// fitFlags are the words of one fit command.
type fitFlags struct {
	reference, format       string
	degree                  int
	raw, origin             bool
	hold                    string
	thermometer, instrument string
}

func (s *session) fit() *cobra.Command {
	var f fitFlags
	c := &cobra.Command{
		Use: "fit POINTS.csv --reference T --degree N", Short: "Turn measured points into coefficients with their uncertainties",
		Long: `Fits a polynomial about a reference temperature to measured points: columns
temperature and resistance (or resistivity, or resistance_ratio), units in the
head. A column uncertainty (standard) weighs the points. --format yaml gives a
data set ready to paste. --raw takes plain columns x,y and reports b0…bn in
powers of (x − reference), for comparison with statistical references.`,
		Example: `  ohmfolio fit strip.csv --reference "25 °C" --degree 2 --format yaml`,
		Args:    exactArgs(1, "a CSV file of points"),
		RunE:    func(_ *cobra.Command, args []string) error { return s.runFit(args[0], f) },
	}
	c.Flags().StringVar(&f.reference, "reference", "", "reference temperature with its unit; with --raw a bare number, 0 when not given")
	c.Flags().IntVar(&f.degree, "degree", 2, "degree of the polynomial: 1 to 3, with --raw to 10")
	c.Flags().StringVar(&f.format, "format", "text", "text, json or yaml")
	c.Flags().StringVar(&f.hold, "hold", "", `hold the value at the reference temperature: "1.0002 mΩ"`)
	c.Flags().StringVar(&f.thermometer, "thermometer", "", `standard uncertainty common to all temperatures: "0.02 K"`)
	c.Flags().StringVar(&f.instrument, "instrument", "", `standard uncertainty common to all values, relative: "0.005 %"`)
	c.Flags().BoolVar(&f.raw, "raw", false, "take columns x,y of any meaning")
	c.Flags().BoolVar(&f.origin, "through-origin", false, "leave out b0 (with --raw)")
	return c
}

func (s *session) runFit(file string, f fitFlags) error {
	if err := oneOf("--format", f.format, "text", "json", "yaml"); err != nil {
		return err
	}
	if f.raw {
		return s.runRawFit(file, f)
	}
	if f.origin {
		return fmt.Errorf("--through-origin goes with --raw")
	}
	if f.reference == "" {
		return fmt.Errorf(`fit needs --reference with a temperature: --reference "25 °C"`)
	}
	if f.degree < 1 || f.degree > 3 {
		return fmt.Errorf("--degree takes 1, 2 or 3, not %d", f.degree)
	}
	reference, err := temperature("--reference", f.reference)
	if err != nil {
		return err
	}
	points, header, err := s.points(file)
	if err != nil {
		return err
	}
	o := fit.Options{Reference: reference, Degree: f.degree, Weighted: header.HasUncertainty()}
	if err := holdAt(&o, f.hold, header); err != nil {
		return err
	}
	r, err := fit.Polynomial(points, o)
	if err != nil {
		return requestError{err}
	}
	m, err := newMeasured(r, points, header, f)
	if err != nil {
		return err
	}
	switch f.format {
	case "json":
		return printJSON(s.out, m.json())
	case "yaml":
		m.yaml(s.out)
		return nil
	}
	m.text(s.out)
	return nil
}

func holdAt(o *fit.Options, text string, h fit.Header) error {
	if text == "" {
		return nil
	}
	q, p := quantity.Parse(h.Kind, text)
	if p != nil || !q.HasValue() {
		return fmt.Errorf("--hold takes a %s, not %q", h.Kind, text)
	}
	o.Hold, o.Held = true, q.Value
	return nil
}

// points reads a points file; its findings are printed.
func (s *session) points(file string) ([]fit.Point, fit.Header, error) {
	info, err := os.Stat(file)
	if err != nil {
		return nil, fit.Header{}, requestError{fmt.Errorf("the points file cannot be read: %w", err)}
	}
	if info.Size() > columns.MaxBytes {
		return nil, fit.Header{}, wrong("%s is larger than 64 MiB", file)
	}
	text, err := os.ReadFile(file)
	if err != nil {
		return nil, fit.Header{}, err
	}
	points, header, findings := fit.ReadPoints(place.NewSource(filepath.ToSlash(file), text))
	if len(findings) > 0 {
		s.printFindings(findings)
		return nil, header, errShown
	}
	return points, header, nil
}

// runRawFit fits columns x,y in the units of the file.
func (s *session) runRawFit(file string, f fitFlags) error {
	if f.format == "yaml" || f.hold != "" || f.thermometer != "" || f.instrument != "" {
		return fmt.Errorf("--raw goes with --format text or json, and without --hold, --thermometer and --instrument")
	}
	reference := 0.0
	if f.reference != "" {
		var err error
		if reference, err = strconv.ParseFloat(f.reference, 64); err != nil || math.IsNaN(reference) || math.IsInf(reference, 0) {
			return fmt.Errorf("with --raw --reference takes a bare number, not %q", f.reference)
		}
	}
	if f.degree < 1 || f.degree > fit.MaxDegree {
		return fmt.Errorf("--degree takes 1 to %d with --raw, not %d", fit.MaxDegree, f.degree)
	}
	text, err := os.ReadFile(file)
	if err != nil {
		return requestError{fmt.Errorf("the points file cannot be read: %w", err)}
	}
	points, findings := fit.ReadRaw(place.NewSource(filepath.ToSlash(file), text))
	if len(findings) > 0 {
		s.printFindings(findings)
		return errShown
	}
	r, err := fit.Polynomial(points, fit.Options{Reference: reference, Degree: f.degree, Origin: f.origin})
	if err != nil {
		return requestError{err}
	}
	j := rawJSON(r)
	if f.format == "json" {
		return printJSON(s.out, j)
	}
	fmt.Fprintf(s.out, "degree %d about %g, %d points, %d degrees of freedom\n", j.Degree, j.Reference, j.N, j.Dof)
	for _, c := range j.Coefficients {
		fmt.Fprintf(s.out, "  %-4s %.15g  (standard uncertainty %.15g)\n", c.Name, c.Value, c.U)
	}
	fmt.Fprintf(s.out, "  residual standard deviation %.15g, R² %.15g\n", j.ResidualSD, *j.RSquared)
	fmt.Fprint(s.out, warningsText(r.Warnings))
	return nil
}

func warningsText(list []string) string {
	var b strings.Builder
	for _, w := range list {
		b.WriteString("  warning: " + w + "\n")
	}
	return b.String()
}
