package command

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"ohmfolio/generator/quantity"
	"ohmfolio/generator/statement"
)

// valueFlags are the words of one value command.
type valueFlags struct {
	at, reference, unit, data, format string
	extrapolate                       bool
}

func (s *session) value() *cobra.Command {
	var f valueFlags
	c := &cobra.Command{
		Use: "value MATERIAL QUANTITY --at T", Short: "Tell one number with its band, range and source",
		Long: `Tells resistivity, conductivity or resistance-ratio, which is R(T)/R(reference)
of a fixed body, with everything that belongs to the number. Outside the valid
range there is no number, unless --extrapolate asks for a guess by the formula.`,
		Example:           `  ohmfolio value copper-annealed resistivity --at "85 °C"`,
		Args:              exactArgs(2, "a material and a quantity: copper-annealed resistivity"),
		ValidArgsFunction: s.completeID,
		RunE:              func(_ *cobra.Command, args []string) error { return s.runValue(args[0], args[1], f) },
	}
	c.Flags().StringVar(&f.at, "at", "", `temperature with its unit: "85 °C", "-40 degC", "4 K"`)
	c.Flags().StringVar(&f.reference, "reference", "", "reference temperature of a resistance ratio; the data set's own when not given")
	c.Flags().StringVar(&f.unit, "unit", "", "unit of the answer; the house unit when not given")
	c.Flags().StringVar(&f.data, "data", "", "data set; the adopted one when not given")
	c.Flags().StringVar(&f.format, "format", "text", "text or json")
	c.Flags().BoolVar(&f.extrapolate, "extrapolate", false, "go beyond the valid range by the formula; the answer is marked")
	return c
}

func exactArgs(n int, what string) cobra.PositionalArgs {
	return func(c *cobra.Command, args []string) error {
		if len(args) != n {
			return fmt.Errorf("%s takes %s", c.Name(), what)
		}
		return nil
	}
}

func (s *session) runValue(id, asked string, f valueFlags) error {
	if err := oneOf("--format", f.format, "text", "json"); err != nil {
		return err
	}
	if err := oneOf("the quantity", asked, statement.AskResistivity, statement.AskConductivity, statement.AskResistanceRatio); err != nil {
		return err
	}
	if f.at == "" {
		return fmt.Errorf(`value needs --at with a temperature: --at "85 °C"`)
	}
	at, err := temperature("--at", f.at)
	if err != nil {
		return err
	}
	reference, err := optionalTemperature("--reference", f.reference)
	if err != nil {
		return err
	}
	lib, r, err := s.loadOne(id)
	if err != nil {
		return err
	}
	a, err := statement.Ask(lib, r, statement.Question{Quantity: asked, At: at, Reference: reference, Set: f.data, Unit: f.unit, Extrapolate: f.extrapolate})
	if err != nil {
		return requestError{fmt.Errorf("%s: %w", r.ID, err)}
	}
	if f.format == "json" {
		return printJSON(s.out, a)
	}
	s.printAnswer(a)
	return nil
}

// printAnswer prints the number first, then what belongs to it.
func (s *session) printAnswer(a statement.Answer) {
	head := a.Text
	if a.Extrapolated {
		head += "  EXTRAPOLATED"
	}
	fmt.Fprintln(s.out, head)
	line := func(name, text string) {
		if text != "" {
			fmt.Fprintf(s.out, "  %-13s %s\n", name, text)
		}
	}
	at := quantity.CelsiusText(a.TemperatureC + quantity.ZeroCelsius)
	if a.ReferenceC != nil {
		at += " over its value at " + quantity.CelsiusText(*a.ReferenceC+quantity.ZeroCelsius)
	}
	line("what", a.Quantity+" of "+a.Material+" at "+at)
	switch {
	case a.Band == "":
		line("limits", "not stated")
	case a.Limits == nil:
		line("uncertainty", a.Band)
	default:
		line("limits", strings.TrimPrefix(a.Band, "limits "))
	}
	line("valid range", quantity.CelsiusText(a.ValidRangeC[0]+quantity.ZeroCelsius)+" to "+quantity.CelsiusText(a.ValidRangeC[1]+quantity.ZeroCelsius))
	line("data", fmt.Sprintf("%s, basis %s, class %s, condition %s", a.Data, a.Basis, a.Class, a.Condition))
	line("source", a.Source+", checked against: "+a.Checked)
	line("state", fmt.Sprintf("%s, revision %d, fingerprint %s", a.Status, a.Revision, a.Fingerprint))
	line("note", strings.Join(a.Caveats, "\n                "))
}
