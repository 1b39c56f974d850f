package command

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"ohmfolio/generator/quantity"
	"ohmfolio/generator/statement"
)

func (s *session) tcr() *cobra.Command {
	var window, reference, data, format string
	c := &cobra.Command{
		Use: `tcr MATERIAL --window "A to B"`, Short: "Tell every measure of the temperature coefficient over a window",
		Long: `Tells slope, chords, box and change of the resistance of a fixed body over a
window about a reference temperature. Each measure is named: figures of
different measures must not be compared.`,
		Example:           `  ohmfolio tcr cumn12ni --window "20 °C to 60 °C" --reference "20 °C"`,
		Args:              exactArgs(1, "a material: cumn12ni"),
		ValidArgsFunction: s.completeID,
		RunE: func(_ *cobra.Command, args []string) error {
			return s.runTCR(args[0], window, reference, data, format)
		},
	}
	c.Flags().StringVar(&window, "window", "", `window with its unit: "-40 °C to 85 °C"`)
	c.Flags().StringVar(&reference, "reference", "", "reference temperature; the data set's own when not given")
	c.Flags().StringVar(&data, "data", "", "data set; the adopted one when not given")
	c.Flags().StringVar(&format, "format", "text", "text or json")
	return c
}

func (s *session) runTCR(id, window, reference, data, format string) error {
	if err := oneOf("--format", format, "text", "json"); err != nil {
		return err
	}
	if window == "" {
		return fmt.Errorf(`tcr needs --window with two temperatures: --window "-40 °C to 85 °C"`)
	}
	lo, hi, err := windowOf(window)
	if err != nil {
		return err
	}
	ref, err := optionalTemperature("--reference", reference)
	if err != nil {
		return err
	}
	lib, r, err := s.loadOne(id)
	if err != nil {
		return err
	}
	a, err := statement.TCR(lib, r, data, lo, hi, ref)
	if err != nil {
		return requestError{fmt.Errorf("%s: %w", r.ID, err)}
	}
	if format == "json" {
		return printJSON(s.out, a)
	}
	s.printTCR(a)
	return nil
}

func (s *session) printTCR(a statement.TCRAnswer) {
	kelvin := func(c float64) string { return quantity.CelsiusText(c + quantity.ZeroCelsius) }
	perK := func(x float64) string { return quantity.PPMText(x * 1e-6) }
	chord := func(x *float64) string {
		if x == nil {
			return "none on this side"
		}
		return perK(*x)
	}
	fmt.Fprintf(s.out, "%s, data set %s, %s to %s about %s; ppm/K\n", a.Material, a.Data, kelvin(a.WindowC[0]), kelvin(a.WindowC[1]), kelvin(a.ReferenceC))
	line := func(name, text string) { fmt.Fprintf(s.out, "  %-20s %s\n", name, text) }
	line("slope at reference", perK(a.Slope.AtReference))
	line("slope over window", perK(a.Slope.Min)+" to "+perK(a.Slope.Max))
	line("chord, cold", chord(a.Chord.Cold))
	line("chord, hot", chord(a.Chord.Hot))
	line("box", perK(a.Box))
	line("change", quantity.ChangeText(a.Change.MinPPM*1e-6)+" at "+kelvin(a.Change.MinAtC)+", "+quantity.ChangeText(a.Change.MaxPPM*1e-6)+" at "+kelvin(a.Change.MaxAtC))
	line("greatest change", quantity.ChangeText(a.Change.GreatestPPM*1e-6)+" at "+kelvin(a.Change.GreatestAtC))
	for _, t := range a.TurningPoints {
		where := "outside the window"
		if t.InsideWindow {
			where = "inside the window"
		}
		line("turning point", fmt.Sprintf("%s at %s, %s, %s", t.Kind, kelvin(t.C), quantity.ChangeText(t.PPM*1e-6), where))
	}
	if a.Limits == nil {
		line("limits", "not stated")
	} else {
		line("limits", fmt.Sprintf("box %s to %s, change %s to %s (worst case of %s)", perK(a.Limits.BoxPPMPerK[0]), perK(a.Limits.BoxPPMPerK[1]),
			quantity.ChangeText(a.Limits.GreatestPPM[0]*1e-6), quantity.ChangeText(a.Limits.GreatestPPM[1]*1e-6), strings.Join(a.Limits.Covers, ", ")))
	}
	line("source", a.Source+", checked against: "+a.Checked)
	line("state", fmt.Sprintf("%s, revision %d, fingerprint %s", a.Status, a.Revision, a.Fingerprint))
	if len(a.Caveats) > 0 {
		line("note", strings.Join(a.Caveats, "\n                       "))
	}
}
