package main

import (
	"strconv"

	"github.com/spf13/cobra"
)

const completionHelp = `linewitness completion prints a script that makes a shell complete the verbs, the
options and the design files of linewitness.

  linewitness completion bash
  linewitness completion zsh
  linewitness completion fish
  linewitness completion powershell

Example, for this session of bash:
  source <(linewitness completion bash)
`

var shells = []string{"bash", "zsh", "fish", "powershell"}

func (a *app) completionCommand() *cobra.Command {
	return &cobra.Command{
		Use:       "completion SHELL",
		Short:     "a completion script",
		Long:      completionHelp,
		Args:      exactlyOne("the name of a shell"),
		ValidArgs: shells,
		RunE: func(cmd *cobra.Command, args []string) error {
			root := cmd.Root()
			switch args[0] {
			case "bash":
				return root.GenBashCompletionV2(a.stdout, true)
			case "zsh":
				return root.GenZshCompletion(a.stdout)
			case "fish":
				return root.GenFishCompletion(a.stdout, true)
			case "powershell":
				return root.GenPowerShellCompletionWithDesc(a.stdout)
			}
			e := choiceError{args[0], shells}
			return usageError("completion: unknown shell "+strconv.Quote(args[0]), e.hint())
		},
	}
}

// designFiles lets a shell complete the names of design files.
func designFiles(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
	return []string{"yaml", "yml"}, cobra.ShellCompDirectiveFilterFileExt
}

// oneOf lets a shell complete the words of an option.
func oneOf(words ...string) cobra.CompletionFunc {
	return cobra.FixedCompletions(words, cobra.ShellCompDirectiveNoFileComp)
}
