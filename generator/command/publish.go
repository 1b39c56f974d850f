package command

import (
	"encoding/json"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"runtime"
	"runtime/debug"
	"strings"
	"sync"
	"time"

	"github.com/spf13/cobra"

	"ohmfolio/generator/changes"
	"ohmfolio/generator/examine"
	"ohmfolio/generator/export"
	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
	"ohmfolio/generator/place"
	"ohmfolio/generator/sheet"
	"ohmfolio/generator/site"
	"ohmfolio/generator/statement"
	"ohmfolio/generator/study"
	"ohmfolio/themes"
)

func (s *session) publish() *cobra.Command {
	var f publishFlags
	c := &cobra.Command{
		Use: "publish", Short: "Examine the reference, then write the whole site",
		Long: `Examines everything, then writes the site. Nothing is written while a record
or a page is in error. A binding study that does not hold is written with its
verdict, and the exit code is 1. With --edition, what the reference states is
also frozen under that name in materials/editions, which the keeper commits.`,
		Example: "  ohmfolio publish --into public --edition 2026-06",
		Args:    cobra.NoArgs,
		RunE: func(_ *cobra.Command, _ []string) error {
			if f.into == "" {
				f.into = filepath.Join(s.folder, "public")
			}
			if f.without != "" && f.without != "offers" {
				return fmt.Errorf("--without %q: only offers can be left out", f.without)
			}
			return s.runPublish(f)
		},
	}
	c.Flags().StringVar(&f.into, "into", "", "folder for the site; public/ under --folder when not given")
	c.Flags().StringVar(&f.without, "without", "", "leave out: offers, so that the site may go to customers")
	c.Flags().StringVar(&f.report, "report", "", "file for a report in JSON")
	c.Flags().StringVar(&f.archive, "archive", "", "file for the whole site as one archive too: site.zip")
	c.Flags().StringVar(&f.edition, "edition", "", "name of an edition to freeze, such as 2026-06")
	c.Flags().BoolVar(&s.quiet, "quiet", false, "say nothing but errors")
	return c
}

// reportJSON is what --report writes; the names are a contract.
type reportJSON struct {
	Written  int                   `json:"written"`
	Removed  int                   `json:"removed"`
	Pages    int                   `json:"pages"`
	Files    int                   `json:"files"`
	Bytes    int64                 `json:"bytes"`
	Seconds  float64               `json:"seconds"`
	Findings []examine.FindingJSON `json:"findings"`
	Failing  []failingJSON         `json:"failing"`
}

// failingJSON is one binding study that does not hold.
type failingJSON struct {
	Study    string `json:"study"`
	Title    string `json:"title"`
	File     string `json:"file"`
	Material string `json:"material"`
	Verdict  string `json:"verdict"`
	// Changed names the records that changed since it held, where the site
	// published before tells.
	Changed []string `json:"changed"`
}

// publishFlags are the words of one publish command.
type publishFlags struct {
	into, report, without, edition string
	archive                        string // file for the whole site as one archive
}

func (s *session) runPublish(f publishFlags) error {
	relaxCollector(0)
	start := time.Now()
	lib, err := s.loadWhole()
	if err != nil {
		return err
	}
	relaxCollector(lib.EditionBytes())
	if f.without == "offers" {
		lib.LeaveOutOffers()
	}
	if err := s.mayFreeze(f.edition); err != nil {
		return err
	}
	outcomes, findings := examineAll(lib, "")
	rep := reportJSON{Findings: examine.JSON(findings).Findings, Failing: failing(outcomes, before(f.into))}
	if s.quiet {
		s.printFindings(onlyErrors(findings))
	} else {
		s.printFindings(findings)
	}
	if n := place.Count(findings, place.Error); n > 0 {
		fmt.Fprintf(s.err, "nothing is written: %s\n", plural(n, "error"))
		return joinError(errShown, writeReport(f.report, rep, start))
	}
	frozen, err := addEdition(lib, outcomes, f.edition)
	if err != nil {
		return err
	}
	result, pages, err := s.write(lib, outcomes, findings, f)
	if err == nil && f.edition != "" {
		err = s.keepEdition(f.edition, frozen)
	}
	rep.Written, rep.Removed, rep.Files, rep.Bytes, rep.Pages = result.Written, result.Removed, result.Files, result.Bytes, pages
	if err := joinError(err, writeReport(f.report, rep, start)); err != nil {
		return err
	}
	if len(rep.Failing) > 0 {
		return wrong("the site is written; %s not hold: %s", plural(len(rep.Failing), "binding verdict")+" does", failingText(rep.Failing))
	}
	if s.quiet {
		return nil
	}
	fmt.Fprintf(s.out, "%s, %s, %d written, %.1f s: %s\n", plural(len(lib.Materials), "material"), plural(result.Files, "file"),
		result.Written, time.Since(start).Seconds(), filepath.ToSlash(filepath.Join(f.into, "index.html")))
	return nil
}

// relaxCollector trades memory for time: many small pages make much garbage.
// What is held for good comes on top of the limit.
func relaxCollector(held int64) {
	debug.SetGCPercent(400)
	debug.SetMemoryLimit(128<<20 + 2*held)
}

func joinError(first, second error) error {
	if first != nil {
		return first
	}
	return second
}

// before reads the decisions of the site as it was published last.
func before(into string) []export.Decision {
	text, err := os.ReadFile(filepath.Join(into, filepath.FromSlash(export.DecisionsPath)))
	if err != nil {
		return nil // nothing was published yet
	}
	return export.ReadDecisions(text)
}

func failing(outcomes []examine.Judged, before []export.Decision) []failingJSON {
	list := []failingJSON{}
	for _, j := range outcomes {
		for _, m := range j.Outcome.Broken() {
			now := export.Decision{Document: j.Document.Source.File, Title: j.Outcome.Title, Material: m.Material, Size: m.Size, Evidence: m.Evidence}
			changed := append([]string{}, export.WhatChanged(before, now)...)
			list = append(list, failingJSON{j.Outcome.Study, j.Outcome.Title, j.Document.Source.File, m.Material, string(m.Verdict), changed})
		}
	}
	return list
}

func failingText(list []failingJSON) string {
	var parts []string
	for _, f := range list {
		text := f.Title + ": " + f.Material + " " + f.Verdict
		if len(f.Changed) > 0 {
			text += ", held before " + strings.Join(f.Changed, " and ") + " changed"
		}
		parts = append(parts, text)
	}
	return strings.Join(parts, "; ")
}

func writeReport(file string, r reportJSON, start time.Time) error {
	if file == "" {
		return nil
	}
	r.Seconds = time.Since(start).Seconds()
	text, err := json.MarshalIndent(r, "", "  ")
	if err != nil {
		return err
	}
	return os.WriteFile(file, append(text, '\n'), 0o644)
}

// write makes the statements, joins the lists and puts the files in place.
func (s *session) write(lib *library.Library, outcomes []examine.Judged, findings []place.Finding, f publishFlags) (output.Result, int, error) {
	list, err := Outputs(lib, outcomes, findings, themeOf(s.folder))
	if err != nil {
		return output.Result{}, 0, err
	}
	pages := 0
	for _, o := range list {
		if strings.HasSuffix(o.Path, ".html") {
			pages++
		}
	}
	o := output.Options{Parallel: runtime.GOMAXPROCS(0), Progress: s.progress()}
	result, err := output.Publish(f.into, list, o)
	if err == nil && f.archive != "" {
		err = output.Archive(f.archive, list, o)
	}
	return result, pages, err
}

// Outputs joins the pages and the data files of a reference.
func Outputs(lib *library.Library, outcomes []examine.Judged, findings []place.Finding, theme fs.FS) ([]output.Output, error) {
	return outputsOf(&site.Input{Library: lib, Outcomes: byDocument(outcomes), Findings: findings, Theme: theme, Topics: allTopics()}, outcomes)
}

// outputsOf joins them for an input of the pages.
func outputsOf(in *site.Input, outcomes []examine.Judged) ([]output.Output, error) {
	lib := in.Library
	now := sync.OnceValue(func() *changes.Statement { return changes.Freeze(lib, in.Outcomes, "") })
	addHistory(in, lib, now)
	in.Statement = func(r *material.Record) *statement.Statement { return statement.Of(lib, r) }
	in.Answer = func(question, written, id string) (string, string, bool) {
		r := lib.Material(id)
		if r == nil {
			return written, "", false
		}
		a, err := statement.AskInWords(lib, r, question, written)
		return a.Text, a.Note, err == nil
	}
	in.Files = filesOf
	pages, err := site.Outputs(in)
	if err != nil {
		return nil, err
	}
	var decisions []export.Decision
	for _, j := range outcomes {
		decisions = append(decisions, export.DecisionsOf(j.Document.Source.File, j.Outcome)...)
	}
	list := append(append(pages, export.Outputs(lib)...), export.Decisions(decisions))
	list = append(list, sheet.Outputs(&sheet.Input{Library: lib, Statement: in.Statement, Cautions: study.SheetCautions(), Studies: onPaper(outcomes)})...)
	return append(list, statementFiles(lib, now)...), nil
}

// onPaper are the studies of the reports, counted by document.
func onPaper(outcomes []examine.Judged) []sheet.Study {
	var list []sheet.Study
	count := map[*library.Document]int{}
	for _, j := range outcomes {
		if j.Document.Room != "" {
			list = append(list, sheet.Study{Stem: j.Document.Stem, Index: count[j.Document], Document: j.Document.Page.Title, Outcome: j.Outcome})
			count[j.Document]++
		}
	}
	return list
}

// filesOf tells the pages of the files for other programs; one reason that
// there is none is said once.
func filesOf(r *material.Record) []site.File {
	var list []site.File
	for _, f := range export.Files(r) {
		if n := len(list); n > 0 && f.Refused != "" && f.Refused == list[n-1].Refused {
			list[n-1].For += ", " + f.For
			continue
		}
		list = append(list, site.File{For: f.For, Path: f.Path, Refused: f.Refused})
	}
	if len(list) == 1 {
		list[0].For = "" // none at all
	}
	return list
}

// themeOf is the built-in theme, which the folder's own themes/ overrides
// file by file.
func themeOf(folder string) fs.FS {
	return overlay{own: os.DirFS(filepath.Join(folder, "themes")), built: themes.Files}
}

// overlay takes a file from own when it is there.
type overlay struct{ own, built fs.FS }

// Open implements fs.FS.
func (o overlay) Open(name string) (fs.File, error) {
	if f, err := o.own.Open(name); err == nil {
		return f, nil
	}
	return o.built.Open(name)
}

// progress prints a line that counts, on a terminal and after the first
// second only.
func (s *session) progress() func(done, total int) {
	if s.quiet || !terminal(s.err) {
		return nil
	}
	start, last := time.Now(), time.Time{}
	var mu sync.Mutex
	return func(done, total int) {
		mu.Lock()
		defer mu.Unlock()
		now := time.Now()
		if now.Sub(start) < time.Second || (now.Sub(last) < 100*time.Millisecond && done < total) {
			return
		}
		last = now
		fmt.Fprintf(s.err, "\r%d of %d files", done, total)
		if done == total {
			fmt.Fprintln(s.err)
		}
	}
}
