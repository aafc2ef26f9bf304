package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"linewitness/report"
	"linewitness/sim"
	"linewitness/sim/design"
	"linewitness/sim/record"
)

// An app is the program with its surroundings.
type app struct {
	stdin  io.Reader
	stdout *sink
	stderr io.Writer

	// The two steps that take time. Tests put others in their place to stop
	// the program in the middle of one.
	verify   func(context.Context, *design.File, sim.Options) (*record.Record, error)
	writePDF func(io.Writer, *record.Record, report.Options) error
}

func newApp(stdin io.Reader, stdout, stderr io.Writer) *app {
	return &app{stdin, &sink{w: stdout}, stderr, sim.Verify, report.WritePDF}
}

// run is the program: it returns the exit status.
func run(ctx context.Context, args []string, stdin io.Reader, stdout, stderr io.Writer) int {
	return newApp(stdin, stdout, stderr).run(ctx, args)
}

func (a *app) run(ctx context.Context, args []string) int {
	status := a.explain(a.execute(ctx, args))
	if a.stdout.err != nil {
		status = max(status, a.explain(fileError("standard output: "+a.stdout.err.Error(), "")))
	}
	return status
}

// execute runs the verb that args name.
func (a *app) execute(ctx context.Context, args []string) error {
	root := a.rootCommand()
	// cobra looks at the options before it looks for the verb; a mistyped verb
	// would be reported as an unknown option of its first option.
	if len(args) > 0 && !strings.HasPrefix(args[0], "-") {
		if err := checkVerb(root, args[0]); err != nil {
			return err
		}
	}
	root.SetArgs(args)
	return root.ExecuteContext(ctx)
}

// explain says on stderr what went wrong and returns the exit status.
func (a *app) explain(err error) int {
	var (
		f      *failure
		status errStatus
	)
	switch {
	case err == nil:
		return statusVerified
	case errors.As(err, &status):
		return int(status)
	case errors.Is(err, context.Canceled):
		f = &failure{statusInterrupted, "interrupted", ""}
	case !errors.As(err, &f):
		f = usageError(err.Error(), "")
	}
	fmt.Fprintf(a.stderr, "linewitness: %s\n", f.message)
	if f.hint != "" {
		fmt.Fprintf(a.stderr, "hint: %s\n", f.hint)
	}
	return f.status
}

const rootHelp = `linewitness solves a transmission-line network twice, in time and in closed form,
compares the two, and writes a record for the design review.

  linewitness verify DESIGN...    solve, compare, judge; write DESIGN.pdf and DESIGN.json
  linewitness recheck RECORD.pdf  solve the design in a record again and compare
  linewitness compare OLD NEW     what changed in a design, and what that did
  linewitness plan DESIGN         the grid and the predicted cost; solves nothing
  linewitness starter [FILE]      write a commented design file to begin from
  linewitness cables              the cable table with its pedigree
  linewitness schema              the JSON Schema of the design file, for editors
  linewitness version             the version of this program
  linewitness completion SHELL    a completion script for bash, zsh, fish or powershell
  linewitness help VERB           more about a verb

The exit status is 0 if every design is verified, 1 if a requirement is missed or
not shown or a claim contradicted, 2 for bad usage or a bad design file, 3 if the
two methods disagree, 4 if there is no steady state, 5 if a file could not be read
or written, and 130 if interrupted. With several designs it is the highest. What it
says of a comparison is in the help of the verb.

Example:
  linewitness starter feeder.yaml
  linewitness verify feeder.yaml
`

func (a *app) rootCommand() *cobra.Command {
	root := &cobra.Command{
		Use:           "linewitness",
		Long:          rootHelp,
		Args:          cobra.ArbitraryArgs,
		SilenceErrors: true,
		SilenceUsage:  true,
		Version:       versionLine(),
		RunE: func(*cobra.Command, []string) error {
			return usageError("no verb given", `"linewitness --help" lists the verbs`)
		},
	}
	root.SetIn(a.stdin)
	root.SetOut(a.stdout)
	root.SetErr(a.stderr)
	root.SetVersionTemplate("{{.Version}}\n")
	root.SetFlagErrorFunc(flagError)
	root.SetHelpFunc(func(cmd *cobra.Command, _ []string) { io.WriteString(a.stdout, cmd.Long) })
	root.CompletionOptions.DisableDefaultCmd = true // completion.go has our own
	root.SetHelpCommand(helpCommand())
	root.AddCommand(
		a.verifyCommand(), a.recheckCommand(), a.compareCommand(), a.planCommand(), a.starterCommand(),
		a.cablesCommand(), a.schemaCommand(), a.versionCommand(), a.completionCommand(),
	)
	return root
}

func helpCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "help [VERB]",
		Short: "more about a verb",
		Long:  rootHelp,
		Args:  atMostOne("a verb"),
		RunE: func(cmd *cobra.Command, args []string) error {
			root := cmd.Root()
			if len(args) == 0 {
				return root.Help()
			}
			if err := checkVerb(root, args[0]); err != nil {
				return err
			}
			verb, _, err := root.Find(args)
			if err != nil {
				return err
			}
			return verb.Help()
		},
	}
}

// checkVerb refuses what is not a verb of root. The two hidden verbs are those
// that cobra's completion scripts call.
func checkVerb(root *cobra.Command, name string) error {
	verbs := []string{"help"}
	for _, c := range root.Commands() {
		verbs = append(verbs, c.Name())
	}
	hidden := []string{cobra.ShellCompRequestCmd, cobra.ShellCompNoDescRequestCmd}
	if slices.Contains(verbs, name) || slices.Contains(hidden, name) {
		return nil
	}
	hint := `"linewitness --help" lists the verbs`
	if near := nearest(name, verbs); near != "" {
		hint = fmt.Sprintf("did you mean %q? %s", near, hint)
	}
	return usageError(fmt.Sprintf("unknown verb %q", name), hint)
}

// A sink is a writer that remembers its first error, so that the end of the
// program can tell a result that nobody got from one that was delivered.
type sink struct {
	w   io.Writer
	err error
}

func (s *sink) Write(p []byte) (int, error) {
	if s.err != nil {
		return 0, s.err
	}
	n, err := s.w.Write(p)
	s.err = err
	return n, err
}
