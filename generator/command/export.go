package command

import (
	"bytes"
	"fmt"

	"github.com/spf13/cobra"

	"ohmfolio/generator/export"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// exportFlags are the words of one export command.
type exportFlags struct{ as, nominal, window, step, data string }

// exportWriters are the words of --as with what they write.
var exportWriters = map[string]func(*bytes.Buffer, *library.Library, *material.Record, export.Order) error{
	"simulator": export.Simulator, "header": export.LookupHeader, "lookup": export.LookupCSV, "elements": export.Elements,
}

func (s *session) export() *cobra.Command {
	var f exportFlags
	c := &cobra.Command{
		Use: "export MATERIAL --as FORM", Short: "Write a curve for a circuit simulator, firmware or a finite-element program",
		Long: `Writes one material for another program, with its identity and its state:

  simulator   a resistor model with TC1, TC2 and TNOM, about 27 °C unless
              --nominal says otherwise; exact where the curve is a parabola,
              otherwise a fit over the window, with its largest error, and the
              curve itself as an expression
  header      a table of whole numbers as a header of C; step and count are
              chosen so that straight lines stay within one count of the curve
  lookup      the same table as CSV
  elements    resistivity over temperature, ascending, in SI units, as CSV`,
		Example: `  ohmfolio export cumn12ni --as simulator --nominal "25 °C"`,
		Args:    exactArgs(1, "a material: cumn12ni"),
		RunE:    func(_ *cobra.Command, args []string) error { return s.runExport(args[0], f) },
	}
	c.Flags().StringVar(&f.as, "as", "", "simulator, header, lookup or elements")
	c.Flags().StringVar(&f.nominal, "nominal", "", "temperature of the base value; 27 °C for simulators, otherwise the data set's own reference temperature")
	c.Flags().StringVar(&f.window, "window", "", `part of the valid range: "-40 °C to 85 °C"; all of it when not given`)
	c.Flags().StringVar(&f.step, "step", "", `step between rows of a table: "5 K"; chosen when not given`)
	c.Flags().StringVar(&f.data, "data", "", "data set; the adopted one when not given")
	return c
}

func (s *session) runExport(id string, f exportFlags) error {
	if err := oneOf("--as", f.as, "simulator", "header", "lookup", "elements"); err != nil {
		return err
	}
	order, err := f.order()
	if err != nil {
		return err
	}
	lib, r, err := s.loadOne(id)
	if err != nil {
		return err
	}
	var b bytes.Buffer
	if err := exportWriters[f.as](&b, lib, r, order); err != nil {
		return requestError{fmt.Errorf("%s: %w", r.ID, err)}
	}
	s.warnStatus(r)
	_, err = s.out.Write(b.Bytes())
	return err
}

// warnStatus says on stderr when a record must not be built on.
func (s *session) warnStatus(r *material.Record) {
	if r.Status != material.Released {
		fmt.Fprintf(s.err, "warning: %s is %s, not for use\n", r.ID, r.Status)
	}
}

// order reads the flags.
func (f exportFlags) order() (export.Order, error) {
	o := export.Order{Set: f.data}
	var err error
	if o.Nominal, err = optionalTemperature("--nominal", f.nominal); err != nil {
		return o, err
	}
	if f.window != "" {
		lo, hi, err := windowOf(f.window)
		if err != nil {
			return o, err
		}
		o.Window = &material.Window{Lo: lo, Hi: hi}
	}
	if f.step == "" {
		return o, nil
	}
	if f.as == "simulator" {
		return o, fmt.Errorf("--step is for tables; a simulator's model has no rows")
	}
	q, p := quantity.Parse(quantity.TemperatureDifference, f.step)
	if p != nil {
		return o, fmt.Errorf("--step %q: %s", f.step, p.Error())
	}
	if o.Step = q.Value; !q.HasValue() || !(o.Step > 0) {
		return o, fmt.Errorf(`--step takes a temperature difference above zero such as "5 K", not %q`, f.step)
	}
	return o, nil
}
