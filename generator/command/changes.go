package command

import (
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/examine"
	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/study"
)

func (s *session) changes() *cobra.Command {
	var format string
	c := &cobra.Command{
		Use: "changes OLD NEW", Short: "Tell what differs between two references, in effect",
		Long: `Compares two states of a reference: values with unit and %, the greatest
difference of the curves, bands, verdicts that differ, documents affected.
OLD and NEW are each a reference's folder, an edition's file, or a published
site. Spelling, order and comments do not count.`,
		Example: "  ohmfolio changes materials/editions/2026-06.json .",
		Args:    exactArgs(2, "two states: materials/editions/2026-06.json ."),
		RunE: func(_ *cobra.Command, args []string) error {
			if err := oneOf("--format", format, "text", "json"); err != nil {
				return err
			}
			return s.runChanges(args[0], args[1], format)
		},
	}
	c.Flags().StringVar(&format, "format", "text", "text or json")
	return c
}

func (s *session) runChanges(oldPath, newPath, format string) error {
	relaxCollector(1 << 29) // two statements are held
	old, oldLabel, err := s.statementOf(oldPath)
	if err != nil {
		return err
	}
	now, newLabel, err := s.statementOf(newPath)
	if err != nil {
		return err
	}
	r := changes.Compare(old, now, oldLabel, newLabel)
	if format == "json" {
		return printJSON(s.out, r)
	}
	_, err = fmt.Fprint(s.out, r.Text())
	return err
}

// statementOf reads a state of a reference, and the words that name it.
func (s *session) statementOf(path string) (*changes.Statement, string, error) {
	label := filepath.ToSlash(path)
	info, err := os.Stat(path)
	switch {
	case err != nil:
		return nil, "", wrong("there is no %s: name a reference's folder, an edition's file, or a published site", label)
	case !info.IsDir():
		return readStatement(path, label)
	case isFolder(filepath.Join(path, "materials")):
		return s.statementOfFolder(path, label)
	}
	file := filepath.Join(path, "data", "reference.json")
	if _, err := os.Stat(file); err == nil {
		return readStatement(file, label)
	}
	return nil, "", wrong("%s is neither a reference, with a folder materials, nor a published site, with data/reference.json", label)
}

func isFolder(path string) bool {
	info, err := os.Stat(path)
	return err == nil && info.IsDir()
}

func readStatement(file, label string) (*changes.Statement, string, error) {
	if info, err := os.Stat(file); err == nil && info.Size() > library.MaxStatement {
		return nil, "", wrong("%s is larger than 256 MiB, which no statement is", label)
	}
	text, err := os.ReadFile(file)
	if err != nil {
		return nil, "", requestError{err}
	}
	st, err := changes.Read(text)
	if err != nil {
		return nil, "", wrong("%s: %w", label, err)
	}
	if st.Edition != "" {
		label = "edition " + st.Edition
	}
	return st, label, nil
}

// statementOfFolder refuses a folder with records that cannot be read: they
// would look removed. What is wrong in its pages is told, and stops nothing.
func (s *session) statementOfFolder(path, label string) (*changes.Statement, string, error) {
	lib, err := library.Load(path, library.Options{})
	if err != nil {
		return nil, "", err
	}
	outcomes, findings := judged(lib)
	findings = onlyErrors(append(append([]place.Finding{}, lib.Findings...), findings...))
	s.printFindings(findings)
	for _, f := range findings {
		if strings.HasPrefix(f.Position.File, "materials") {
			return nil, "", wrong("%s has records that cannot be read; nothing is compared", label)
		}
	}
	return changes.Freeze(lib, byDocument(outcomes), ""), label, nil
}

// byDocument sorts outcomes by the document that they stand in.
func byDocument(outcomes []examine.Judged) map[string][]*study.Outcome {
	m := map[string][]*study.Outcome{}
	for _, j := range outcomes {
		key := strings.TrimPrefix(j.Document.Room+"/"+j.Document.Stem, "/")
		m[key] = append(m[key], j.Outcome)
	}
	return m
}
