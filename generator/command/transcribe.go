package command

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"

	"github.com/spf13/cobra"

	"ohmfolio/generator/examine"
	"ohmfolio/generator/form"
	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/transcribe"
)

// transcribeFlags are the words of one transcribe command.
type transcribeFlags struct {
	source, columns string
	comma, try      bool
}

const sourcesFile = "materials/sources.yaml"

func (s *session) transcribe() *cobra.Command {
	var f transcribeFlags
	c := &cobra.Command{
		Use: "transcribe TABLE.csv --source ID", Short: "Turn a spreadsheet's rows into draft records",
		Long: `Writes one draft record a row into materials/. Columns are matched by the words
and the unit in their heads: Resistivity [µΩ·cm], TCR ppm/°C, Density (g/cm3).
The mapping is printed first, in the form of a file for --columns. Doubtful
cells stay in the drafts as comments. A file that exists is never overwritten;
--try shows everything and writes nothing.`,
		Example: "  ohmfolio transcribe alloys.csv --source house-table --try\n  ohmfolio transcribe alloys.csv --source house-table --columns alloys-columns.yaml",
		Args:    exactArgs(1, "a CSV file of materials"),
		RunE:    func(_ *cobra.Command, args []string) error { return s.runTranscribe(args[0], f) },
	}
	c.Flags().StringVar(&f.source, "source", "", "ID in materials/sources.yaml that every row cites")
	c.Flags().StringVar(&f.columns, "columns", "", "YAML file that says what the columns hold")
	c.Flags().BoolVar(&f.comma, "comma", false, "numbers have decimal commas; semicolons may stand between columns")
	c.Flags().BoolVar(&f.try, "try", false, "write nothing")
	return c
}

func (s *session) runTranscribe(file string, f transcribeFlags) error {
	if f.source == "" {
		return fmt.Errorf("transcribe needs --source with an ID of %s", sourcesFile)
	}
	table, err := readSource(file, "the table")
	if err != nil {
		return err
	}
	o := transcribe.Options{Source: f.source, Comma: f.comma, PlainID: library.PlainID}
	sources, err := s.sourcesFor(f.source, &o)
	if err != nil {
		return err
	}
	if o.Columns, err = s.columnsFor(f.columns); err != nil {
		return err
	}
	o.Check = func(id string, text []byte) []place.Finding { return draftFindings(sources, id, text) }
	return s.transcribed(transcribe.Run(table, o), table, f.try)
}

// readSource reads a file that somebody named on the command line.
func readSource(file, what string) (*place.Source, error) {
	info, err := os.Stat(file)
	switch {
	case err != nil:
		return nil, wrong("%s cannot be read: %w", what, err)
	case info.IsDir():
		return nil, wrong("%s is a folder", file)
	case info.Size() > form.MaxBytes:
		return nil, wrong("%s is larger than 4 MiB; split it", file)
	}
	text, err := os.ReadFile(file)
	return place.NewSource(filepath.ToSlash(file), text), err
}

// sourcesFor reads sources.yaml and wants id in it.
func (s *session) sourcesFor(id string, o *transcribe.Options) ([]byte, error) {
	text, err := os.ReadFile(filepath.Join(s.folder, filepath.FromSlash(sourcesFile)))
	if err != nil && !errors.Is(err, fs.ErrNotExist) {
		return nil, err
	}
	lib := library.FromFiles(map[string][]byte{sourcesFile: text})
	if broken := onlyErrors(inFile(lib.Findings, sourcesFile)); len(broken) > 0 && len(text) > 0 {
		s.printFindings(broken)
		return nil, errShown
	}
	o.SourceIDs = lib.SourceIDs
	if lib.Source(id) != nil {
		return text, nil
	}
	if near := place.Near(id, lib.SourceIDs); near != "" {
		return nil, wrong("there is no source %q in %s; did you mean %s?", id, sourcesFile, near)
	}
	return nil, wrong("there is no source %q in %s; add it there first:\n%s:\n  kind: handbook   # what the spreadsheet was made from\n  title: …\n  publisher: …\n  checked: memory  # until someone has compared it", id, sourcesFile, id)
}

func (s *session) columnsFor(file string) (*transcribe.Columns, error) {
	if file == "" {
		return nil, nil
	}
	src, err := readSource(file, "the file of columns")
	if err != nil {
		return nil, err
	}
	c, findings := transcribe.ReadColumns(src)
	if len(findings) > 0 {
		s.printFindings(findings)
		return nil, errShown
	}
	return c, nil
}

// draftFindings holds one draft against every rule, as examine would.
func draftFindings(sources []byte, id string, text []byte) []place.Finding {
	file := "materials/" + id + ".yaml"
	lib := library.FromFiles(map[string][]byte{sourcesFile: sources, file: text})
	return inFile(examine.Run(lib, nil, examine.Options{Parallel: 1}), file)
}

// transcribed prints the mapping and the findings and writes the drafts.
func (s *session) transcribed(r transcribe.Result, table *place.Source, try bool) error {
	if r.Mapping != "" {
		fmt.Fprint(s.err, "The columns are read so; a changed copy of these lines is a file for --columns:\n\n", r.Mapping, "\n")
	}
	done, list := 0, place.List{Source: table}
	for _, d := range r.Drafts {
		taken, err := s.writeDraft(d, try)
		if err != nil {
			s.printFindings(r.Findings)
			return err
		}
		if !taken {
			done++
			continue
		}
		list.Add("table-taken", place.Error, d.At, "materials/"+d.ID+".yaml exists and is not overwritten", "rename the row in the table, or move the file away")
	}
	findings := append(r.Findings, list.Findings...)
	place.Sort(findings)
	s.printFindings(findings)
	return s.summary(done, r.Rows, place.Count(findings, place.Error), try)
}

func (s *session) summary(done, rows, errs int, try bool) error {
	verb, next := "are drafts in materials/ now", "; go on with: ohmfolio examine"
	if try {
		verb, next = "would become drafts in materials/", ""
	}
	text := fmt.Sprintf("%d of %s %s", done, plural(rows, "row"), verb)
	if errs > 0 {
		return wrong("%s; see the findings", text)
	}
	fmt.Fprintln(s.out, text+next)
	return nil
}

// writeDraft writes one draft unless its file exists already.
func (s *session) writeDraft(d transcribe.Draft, try bool) (taken bool, err error) {
	file := filepath.Join(s.folder, "materials", d.ID+".yaml")
	if try {
		_, err := os.Lstat(file)
		return err == nil, nil
	}
	if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
		return false, err
	}
	f, err := os.OpenFile(file, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o644)
	if errors.Is(err, fs.ErrExist) {
		return true, nil
	}
	if err != nil {
		return false, err
	}
	_, err = f.Write(d.Text)
	if err := joinError(err, f.Close()); err != nil {
		os.Remove(file) // a half draft is worse than none
		return false, err
	}
	return false, nil
}
