package command

import (
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"ohmfolio/generator/start"
)

func (s *session) start() *cobra.Command {
	return &cobra.Command{
		Use: "start DIR", Short: "Write a new reference with a small example",
		Long: `Writes a small reference that explains itself: three materials, a report with a
study, a guide. DIR must be new or empty; nothing is ever overwritten.`,
		Example: "  ohmfolio start alloys",
		Args:    exactArgs(1, "a new folder"),
		RunE:    func(_ *cobra.Command, args []string) error { return s.runStart(args[0]) },
	}
}

func (s *session) runStart(dir string) error {
	if info, err := os.Stat(dir); err == nil && !info.IsDir() {
		return wrong("%s is a file; a new reference needs a new or an empty folder", filepath.ToSlash(dir))
	}
	n, err := start.Write(dir)
	var taken start.NotEmptyError
	if errors.As(err, &taken) {
		return requestError{err}
	}
	if err != nil {
		return err
	}
	shown := quoted(filepath.ToSlash(dir))
	fmt.Fprintf(s.out, "%s in %s; go on with:\n  ohmfolio examine --folder %s\n  ohmfolio publish --folder %s\nthen open %s\n",
		plural(n, "file"), shown, shown, shown, quoted(filepath.ToSlash(filepath.Join(dir, "public", "index.html"))))
	return nil
}

// quoted is a path as a shell takes it.
func quoted(path string) string {
	if strings.ContainsAny(path, " \t'&;()$*?[]{}<>|~#!\\") {
		return `"` + path + `"`
	}
	return path
}
