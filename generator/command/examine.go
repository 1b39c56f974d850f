package command

import (
	"fmt"

	"github.com/spf13/cobra"

	"ohmfolio/generator/examine"
	"ohmfolio/generator/place"
)

func (s *session) examine() *cobra.Command {
	var format, today string
	c := &cobra.Command{
		Use: "examine [ID…]", Short: "Find what is wrong or doubtful in the records and pages",
		Long: `Holds every record and page against the rules and prints the findings with
their places. With IDs, only the findings of those records are told.
Exit 1 when there is an error.`,
		Example: "  ohmfolio examine cumn12ni --format json",
		RunE: func(_ *cobra.Command, ids []string) error {
			if err := oneOf("--format", format, "text", "json", "sarif"); err != nil {
				return err
			}
			if err := isDate(today); err != nil {
				return err
			}
			return s.runExamine(ids, format, today)
		},
	}
	c.Flags().StringVar(&format, "format", "text", "text, json or sarif")
	c.Flags().StringVar(&today, "today", "", "date to judge due dates by, such as 2026-12-01")
	return c
}

func (s *session) runExamine(ids []string, format, today string) error {
	lib, err := s.loadWhole()
	if err != nil {
		return err
	}
	_, findings := examineAll(lib, today)
	if len(ids) > 0 {
		var chosen []place.Finding
		for _, id := range ids {
			if lib.Material(id) == nil && len(inFile(findings, "materials/"+id+".yaml")) == 0 {
				return wrong("there is no material %q", id)
			}
			if r := lib.Material(id); r != nil {
				id = r.ID
			}
			chosen = append(chosen, inFile(findings, "materials/"+id+".yaml")...)
		}
		findings = chosen
	}
	if err := s.printExamined(findings, format); err != nil {
		return err
	}
	if place.Count(findings, place.Error) > 0 {
		return errShown
	}
	return nil
}

func (s *session) printExamined(findings []place.Finding, format string) error {
	switch format {
	case "json":
		return printJSON(s.out, examine.JSON(findings))
	case "sarif":
		return printJSON(s.out, examine.SARIF(findings))
	}
	if err := place.Print(s.out, findings, place.PrintOptions{Color: colorful(s.out), Group: true}); err != nil {
		return err
	}
	_, err := fmt.Fprintln(s.out, countText(findings))
	return err
}

func countText(findings []place.Finding) string {
	n := examine.Counts(findings)
	return fmt.Sprintf("%s, %s, %s", plural(n["error"], "error"), plural(n["warning"], "warning"), plural(n["note"], "note"))
}

func plural(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}
