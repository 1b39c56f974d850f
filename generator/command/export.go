package command

import (
	"bytes"
	"fmt"

	"github.com/spf13/cobra"

	"ohmfolio/generator/export"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

func (s *session) export() *cobra.Command {
	var as, nominal, window string
	c := &cobra.Command{
		Use: "export MATERIAL --as simulator", Short: "Print one material for another program",
		Long: `Prints the adopted curve of one material for another program, with its
identity: a line for circuit simulators about a nominal temperature (TNOM is
always written), a look-up table for firmware, or a table for finite elements.
A nominal temperature outside the valid range is refused.`,
		Example: `  ohmfolio export cumn12ni --as simulator --nominal "25 °C" --window "15 °C to 60 °C"`,
		Args:    exactArgs(1, "a material: cumn12ni"),
		RunE:    func(_ *cobra.Command, args []string) error { return s.runExport(args[0], as, nominal, window) },
	}
	c.Flags().StringVar(&as, "as", "", "simulator, header, lookup or elements")
	c.Flags().StringVar(&nominal, "nominal", "27 °C", "nominal temperature of the simulator line")
	c.Flags().StringVar(&window, "window", "", "window over which a quadratic is fitted; the valid range when not given")
	return c
}

func (s *session) runExport(id, as, nominal, window string) error {
	if err := oneOf("--as", as, "simulator", "header", "lookup", "elements"); err != nil {
		return err
	}
	t, p := quantity.Parse(quantity.Temperature, nominal)
	if p != nil {
		return fmt.Errorf("--nominal %q: %s", nominal, p.Error())
	}
	var lo, hi quantity.Quantity
	if window != "" {
		if lo, hi, p = quantity.ParseRange(quantity.Temperature, window); p != nil {
			return fmt.Errorf("--window %q: %s", window, p.Error())
		}
	}
	lib, r, err := s.loadOne(id)
	if err != nil {
		return err
	}
	var text bytes.Buffer
	switch as {
	case "simulator":
		l, err := export.Simulator(r, t.Value, lo.Value, hi.Value)
		if err != nil {
			return requestError{err}
		}
		export.WriteSimulator(&text, lib, r, l)
	case "elements":
		temperatures, err := export.Elements(r)
		if err != nil {
			return requestError{err}
		}
		if err := export.WriteElements(&text, r, temperatures); err != nil {
			return err
		}
	default:
		l, err := export.NewLookup(r)
		if err != nil {
			return requestError{err}
		}
		if as == "header" {
			export.WriteHeader(&text, lib, r, l)
		} else if err := export.WriteLookup(&text, r, l); err != nil {
			return err
		}
	}
	s.warnStatus(r)
	_, err = s.out.Write(text.Bytes())
	return err
}

// warnStatus says on stderr when a record must not be built on.
func (s *session) warnStatus(r *material.Record) {
	if r.Status != material.Released {
		fmt.Fprintf(s.err, "warning: %s is %s, not for use\n", r.ID, r.Status)
	}
}
