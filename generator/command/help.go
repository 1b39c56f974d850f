package command

import (
	"fmt"
	"runtime"
	"runtime/debug"
	"sort"
	"strings"

	"github.com/spf13/cobra"

	"ohmfolio/generator/examine"
	"ohmfolio/generator/library"
	"ohmfolio/generator/place"
	"ohmfolio/generator/topics"
	"ohmfolio/generator/transcribe"
)

// allTopics are the topics of help and guide.
func allTopics() []topics.Topic {
	kinds := append(append([]place.Kind{}, examine.Catalogue()...), transcribe.Kinds...)
	sort.SliceStable(kinds, func(i, j int) bool { return kinds[i].Code < kinds[j].Code })
	return topics.All(kinds)
}

// help shows a topic, a command, or what there is.
func (s *session) help(root *cobra.Command) *cobra.Command {
	return &cobra.Command{
		Use: "help [TOPIC]", Short: "Tell about units, record, studies, findings, or a command",
		Long:    "Shows a topic (units, record, studies, findings) or the help of a command.\nThe topics stand in the guide of every site too.",
		Example: "  ohmfolio help units",
		RunE: func(_ *cobra.Command, args []string) error {
			if len(args) == 0 {
				return root.Help()
			}
			if t := topics.Find(allTopics(), args[0]); t != nil && len(args) == 1 {
				return t.Write(s.out)
			}
			if c, rest, err := root.Find(args); err == nil && c != root && len(rest) == 0 {
				c.InitDefaultHelpFlag() // as --help would
				return c.Help()
			}
			return s.noTopic(root, strings.Join(args, " "))
		},
	}
}

func (s *session) noTopic(root *cobra.Command, asked string) error {
	var known, names []string
	for _, t := range allTopics() {
		known = append(known, t.Name)
		names = append(names, t.Name)
	}
	for _, c := range root.Commands() {
		known = append(known, c.Name())
	}
	hint := ""
	if near := place.Near(asked, known); near != "" {
		hint = "; did you mean " + near + "?"
	}
	return fmt.Errorf("there is no topic %q%s; the topics are %s", asked, hint, strings.Join(names, ", "))
}

func (s *session) version() *cobra.Command {
	return &cobra.Command{
		Use: "version", Short: "Tell which build this is",
		Long:    "Tells the version, the revision that it was built from, Go's version and the system.",
		Example: "  ohmfolio version",
		Args:    cobra.NoArgs,
		RunE: func(*cobra.Command, []string) error {
			info, _ := debug.ReadBuildInfo()
			_, err := fmt.Fprint(s.out, buildText(info))
			return err
		},
	}
}

// buildText tells a build in a few lines; info is nil when it is not known.
func buildText(info *debug.BuildInfo) string {
	version, settings := "unknown", map[string]string{}
	if info != nil {
		version = info.Main.Version
		for _, set := range info.Settings {
			settings[set.Key] = set.Value
		}
	}
	revision := settings["vcs.revision"]
	switch {
	case revision == "":
		revision = "not recorded"
	case settings["vcs.modified"] == "true":
		revision += ", with changes"
	}
	text := fmt.Sprintf("ohmfolio %s\nrevision: %s\n", version, revision)
	if at := settings["vcs.time"]; at != "" {
		text += "committed: " + at + "\n"
	}
	return text + fmt.Sprintf("built with: %s for %s/%s\n", runtime.Version(), runtime.GOOS, runtime.GOARCH)
}

// completion writes what a shell needs to complete commands, flags and IDs.
func completion() *cobra.Command {
	shells := []string{"bash", "zsh", "fish", "powershell"}
	return &cobra.Command{
		Use: "completion SHELL", Short: "Write what a shell needs to complete commands and IDs",
		Long:      "Writes a script for bash, zsh, fish or powershell to stdout. Load it from the\nshell's start file.",
		Example:   "  source <(ohmfolio completion bash)",
		Args:      exactArgs(1, "one of "+strings.Join(shells, ", ")),
		ValidArgs: shells,
		RunE: func(c *cobra.Command, args []string) error {
			w := c.OutOrStdout()
			switch args[0] {
			case "bash":
				return c.Root().GenBashCompletionV2(w, true)
			case "zsh":
				return c.Root().GenZshCompletion(w)
			case "fish":
				return c.Root().GenFishCompletion(w, true)
			case "powershell":
				return c.Root().GenPowerShellCompletionWithDesc(w)
			}
			return oneOf("completion", args[0], shells...)
		},
	}
}

// completeID offers the IDs of the records in --folder.
func (s *session) completeID(_ *cobra.Command, args []string, _ string) ([]string, cobra.ShellCompDirective) {
	if len(args) > 0 {
		return nil, cobra.ShellCompDirectiveNoFileComp
	}
	lib, err := library.Load(s.folder, library.Options{})
	if err != nil {
		return nil, cobra.ShellCompDirectiveError
	}
	return lib.IDs(), cobra.ShellCompDirectiveNoFileComp
}
