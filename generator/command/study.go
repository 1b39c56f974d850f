package command

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"regexp"
	"strings"

	"github.com/spf13/cobra"

	"ohmfolio/generator/examine"
	"ohmfolio/generator/place"
	"ohmfolio/generator/study"
	"ohmfolio/generator/words"
)

func (s *session) study() *cobra.Command {
	var format string
	c := &cobra.Command{
		Use: "study FILE.yaml", Short: "Run one study without a site",
		Long: `Runs one study. The file is the body of a study block with one line more that
names the study:

  study: choose
  window: -40 °C to 85 °C
  require: {greatest_change: 0.3 %}

The studies are: ` + studyList() + `.`,
		Example: `  ohmfolio study shunt.yaml --folder . --format json`,
		Args:    exactArgs(1, "a file: shunt.yaml"),
		RunE:    func(_ *cobra.Command, args []string) error { return s.runStudy(args[0], format) },
	}
	c.Flags().StringVar(&format, "format", "text", "text or json")
	return c
}

func studyList() string {
	var names []string
	for _, k := range study.Kinds() {
		names = append(names, k.Name)
	}
	return strings.Join(names, ", ")
}

// studyLine names the study in a file of its own.
var studyLine = regexp.MustCompile(`(?m)^study:[ \t]*([a-z-]*)[ \t]*(#.*)?\r?$`)

// maxStudyFile bounds a study's file.
const maxStudyFile = 1 << 20

func (s *session) runStudy(file, format string) error {
	if err := oneOf("--format", format, "text", "json"); err != nil {
		return err
	}
	text, err := os.ReadFile(file)
	if err != nil {
		return wrong("%v", err)
	}
	if len(text) > maxStudyFile {
		return wrong("%s is larger than a study can be (%d bytes)", file, maxStudyFile)
	}
	block, err := studyOf(filepath.ToSlash(file), text)
	if err != nil {
		return err
	}
	lib, err := s.load()
	if err != nil {
		return err
	}
	o, findings := study.Run(lib, block)
	s.printFindings(findings)
	if o == nil {
		return errShown
	}
	if err := s.recordsUsable(lib.Findings, examine.Run(lib, nil, examine.Options{Parallel: 1}), o); err != nil {
		return err
	}
	if format == "json" {
		err = printJSON(s.out, o)
	} else {
		s.printStudy(o)
	}
	if err == nil && len(o.Broken()) > 0 {
		return wrong("the study is binding and does not hold")
	}
	return err
}

// studyOf takes the line that names the study out of the body, which keeps its
// lines and columns.
func studyOf(file string, text []byte) (words.Study, error) {
	at := studyLine.FindSubmatchIndex(text)
	if at == nil {
		return words.Study{}, wrong("%s names no study: add a line study: NAME, with one of %s", file, studyList())
	}
	name := string(text[at[2]:at[3]])
	body := append([]byte{}, text...)
	for i := at[0]; i < at[1]; i++ {
		body[i] = ' '
	}
	src := place.NewSource(file, body)
	line := bytes.Count(text[:at[0]], []byte("\n")) + 1
	return words.Study{Name: name, Body: src, Position: place.Position{File: file, Line: line, Column: 1}, Level: 1}, nil
}

// recordsUsable refuses a study on records with errors: their numbers must not
// be quoted.
func (s *session) recordsUsable(loaded, found []place.Finding, o *study.Outcome) error {
	used := map[string]bool{}
	for _, m := range o.Materials {
		for _, e := range m.Evidence {
			used["materials/"+e.Record+".yaml"] = true
		}
	}
	var bad []place.Finding
	for _, f := range append(append([]place.Finding{}, loaded...), found...) {
		if f.Severity == place.Error && used[f.Position.File] {
			bad = append(bad, f)
		}
	}
	if len(bad) == 0 {
		return nil
	}
	s.printFindings(bad)
	return errShown
}

// printStudy prints the answer as text: tables, reasons, assumptions,
// cautions.
func (s *session) printStudy(o *study.Outcome) {
	fmt.Fprintln(s.out, o.Title)
	for _, p := range o.Parameters {
		fmt.Fprintf(s.out, "  %s: %s\n", p.Name, p.Text)
	}
	for _, t := range o.Tables {
		printTable(s, t)
	}
	for _, m := range o.Materials {
		for _, t := range m.Tables {
			printTable(s, t)
		}
	}
	if !o.Listed {
		fmt.Fprintln(s.out)
		for _, m := range o.Materials {
			verdict := ""
			if m.Verdict != study.NotAsked {
				verdict = ": " + m.Verdict.Shown()
			}
			fmt.Fprintln(s.out, m.Label()+verdict)
			for _, r := range append(append([]string{}, m.Reasons...), m.Warnings...) {
				fmt.Fprintln(s.out, "  "+r)
			}
		}
	}
	for _, part := range []struct {
		head string
		list []string
	}{{"Assumed", o.Notes}, {"Cautions", o.Cautions}} {
		if len(part.list) > 0 {
			fmt.Fprintln(s.out, "\n"+part.head)
		}
		for _, text := range part.list {
			fmt.Fprintln(s.out, "  "+text)
		}
	}
}

// printTable prints rows under their heads, one fact a line: tables of studies
// are wider than a terminal.
func printTable(s *session, t study.Table) {
	fmt.Fprintln(s.out, "\n"+t.Caption)
	for _, row := range t.Rows {
		for i, cell := range row {
			if i == 0 {
				fmt.Fprintln(s.out, "  "+cell)
			} else if cell != "" {
				fmt.Fprintf(s.out, "    %s: %s\n", t.Heads[i], cell)
			}
		}
	}
}
