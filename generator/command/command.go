// Package command is the command line: it reads words, joins the lists of the
// rooms below, and prints. Results go to stdout, progress and findings to
// stderr. Exit 0: done; 1: the records or the request are wrong, or a binding
// decision fails; 2: the command line is wrong or the machine failed.
package command

import (
	"errors"
	"fmt"
	"io"
	"os"

	"github.com/spf13/cobra"
	"golang.org/x/term"

	"ohmfolio/generator/place"
)

// The exit codes.
const (
	exitDone    = 0
	exitRequest = 1 // records or request are wrong
	exitUsage   = 2 // command line or machine
)

// requestError is a failure of the records or of the request.
type requestError struct{ error }

func wrong(format string, args ...any) error {
	return requestError{fmt.Errorf(format, args...)}
}

// shownError has been printed already.
var errShown = requestError{errors.New("shown")}

// Run runs one command and returns its exit code.
func Run(args []string, stdout, stderr io.Writer) int {
	s := &session{out: stdout, err: stderr}
	root := s.root()
	root.SetArgs(args)
	root.SetOut(stdout)
	root.SetErr(stderr)
	err := root.Execute()
	var request requestError
	switch {
	case err == nil:
		return exitDone
	case errors.As(err, &request):
		if request != errShown {
			fmt.Fprintln(stderr, "error:", err)
		}
		return exitRequest
	}
	fmt.Fprintln(stderr, "error:", err)
	return exitUsage
}

// session is one run of the program.
type session struct {
	out, err io.Writer
	folder   string // --folder
	quiet    bool   // publish says nothing but errors
}

const about = `ohmfolio turns a folder of material records into a reference: a site of
material pages, comparison reports and printable sheets.

A reference is a folder with materials/ (one YAML record a material) and
content/ (the words). Temperatures in flags may be negative: --at "-40 °C".

ohmfolio help TOPIC tells about units, record, studies or findings.`

func (s *session) root() *cobra.Command {
	root := &cobra.Command{
		Use: "ohmfolio", Short: "A reference of resistivity and temperature coefficients", Long: about,
		Example:       `  ohmfolio publish --folder . --into public`,
		SilenceErrors: true, SilenceUsage: true,
		CompletionOptions: cobra.CompletionOptions{DisableDefaultCmd: true},
	}
	root.SetHelpTemplate(helpTemplate)
	root.SetUsageTemplate(helpTemplate)
	root.PersistentFlags().StringVar(&s.folder, "folder", ".", "folder that holds materials/ and content/")
	root.SetHelpCommand(s.help(root))
	root.AddCommand(s.publish(), s.examine(), s.value(), s.tcr(), s.fit(), s.study(), s.export(), s.follow(), s.changes(), s.transcribe(), s.start(), s.version(), completion())
	root.SetFlagErrorFunc(func(c *cobra.Command, err error) error {
		return fmt.Errorf("%w; see ohmfolio %s --help", err, c.Name())
	})
	return root
}

// helpTemplate is our own: purpose, form, example, commands, flags.
const helpTemplate = `{{with or .Long .Short}}{{. | trimTrailingWhitespaces}}{{end}}

{{if .Runnable}}Form:
  {{.UseLine}}

{{end}}{{if .HasExample}}Example:
{{.Example}}

{{end}}{{if .HasAvailableSubCommands}}Commands:
{{range .Commands}}{{if .IsAvailableCommand}}  {{rpad .Name 10}} {{.Short}}
{{end}}{{end}}
ohmfolio COMMAND --help tells more of one.

{{end}}{{if .HasAvailableFlags}}Flags:
{{.Flags.FlagUsages | trimTrailingWhitespaces}}
{{end}}`

// printFindings prints findings to stderr, in colour on a terminal unless
// NO_COLOR is set.
func (s *session) printFindings(findings []place.Finding) {
	place.Print(s.err, findings, place.PrintOptions{Color: colorful(s.err), Group: true})
}

// colorful tells whether w is a terminal that may be written to in colour.
func colorful(w io.Writer) bool {
	return os.Getenv("NO_COLOR") == "" && terminal(w)
}

func terminal(w io.Writer) bool {
	f, ok := w.(*os.File)
	return ok && term.IsTerminal(int(f.Fd()))
}
