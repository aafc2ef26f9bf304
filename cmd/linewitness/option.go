package main

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
)

// A choice is the value of an option that takes one of a few words.
type choice struct {
	value string
	of    []string
}

func (c *choice) String() string { return c.value }
func (c *choice) Type() string   { return strings.Join(c.of, "|") }

func (c *choice) Set(s string) error {
	if !slices.Contains(c.of, s) {
		return &choiceError{s, c.of}
	}
	c.value = s
	return nil
}

// choices is the value of an option that takes some of a few words, in any
// order, separated by commas, or "none".
type choices struct {
	values []string
	of     []string
}

const noChoice = "none"

func (c *choices) Type() string { return strings.Join(c.of, ",") }

func (c *choices) String() string {
	if len(c.values) == 0 {
		return noChoice
	}
	return strings.Join(c.values, ",")
}

func (c *choices) Set(s string) error {
	c.values = nil
	if s == noChoice {
		return nil
	}
	for word := range strings.SplitSeq(s, ",") {
		if word == noChoice {
			return &choiceError{s, append(slices.Clip(c.of), noChoice+" alone")}
		}
		if !slices.Contains(c.of, word) {
			return &choiceError{word, append(slices.Clip(c.of), noChoice)}
		}
		if !c.has(word) {
			c.values = append(c.values, word)
		}
	}
	return nil
}

func (c *choices) has(word string) bool { return slices.Contains(c.values, word) }

// A choiceError is a word that is not among the choices.
type choiceError struct {
	word string
	of   []string
}

func (e *choiceError) Error() string { return fmt.Sprintf("unknown value %q", e.word) }

func (e *choiceError) hint() string {
	hint := "the values are " + strings.Join(e.of, ", ")
	if near := nearest(e.word, e.of); near != "" {
		hint = fmt.Sprintf("did you mean %q? %s", near, hint)
	}
	return hint
}

// flagError turns an error of the option parser into one of our own wording.
func flagError(cmd *cobra.Command, err error) error {
	var (
		unknown *pflag.NotExistError
		missing *pflag.ValueRequiredError
		invalid *pflag.InvalidValueError
		chosen  *choiceError
		help    = fmt.Sprintf("%q lists the options", cmd.CommandPath()+" --help")
	)
	switch {
	case errors.Is(err, pflag.ErrHelp):
		return err
	case errors.As(err, &unknown):
		return unknownOption(cmd, unknown, help)
	case errors.As(err, &missing):
		return usageError(verbOf(cmd)+"option "+dashed(missing.GetSpecifiedName())+" needs a value", help)
	case errors.As(err, &chosen) && errors.As(err, &invalid):
		return usageError(verbOf(cmd)+dashed(invalid.GetFlag().Name)+": "+chosen.Error(), chosen.hint())
	case errors.As(err, &invalid):
		return usageError(fmt.Sprintf("%s%s: %q is neither true nor false", verbOf(cmd), dashed(invalid.GetFlag().Name), invalid.GetValue()), help)
	}
	return usageError(verbOf(cmd)+err.Error(), help)
}

func unknownOption(cmd *cobra.Command, e *pflag.NotExistError, help string) error {
	name := e.GetSpecifiedName()
	var known []string
	cmd.Flags().VisitAll(func(f *pflag.Flag) { known = append(known, f.Name) })
	if near := nearest(name, known); near != "" {
		help = fmt.Sprintf("did you mean %q? %s", "--"+near, help)
	}
	return usageError(fmt.Sprintf("%sunknown option %q", verbOf(cmd), dashed(name)), help)
}

// verbOf is the name of a verb as the start of a message, or nothing for the
// program itself.
func verbOf(cmd *cobra.Command) string {
	if !cmd.HasParent() {
		return ""
	}
	return cmd.Name() + ": "
}

func dashed(name string) string {
	if len(name) == 1 {
		return "-" + name
	}
	return "--" + name
}

// atMostOne, exactlyOne, exactlyTwo and atLeastOne check the number of arguments.

func atMostOne(what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error { return countArgs(cmd, args, what, 0, 1) }
}

func exactlyOne(what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error { return countArgs(cmd, args, what, 1, 1) }
}

func atLeastOne(what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error { return countArgs(cmd, args, what, 1, len(args)) }
}

func exactlyTwo(what string) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error { return countArgs(cmd, args, what, 2, 2) }
}

func noArgs(cmd *cobra.Command, args []string) error { return countArgs(cmd, args, "", 0, 0) }

func countArgs(cmd *cobra.Command, args []string, what string, least, most int) error {
	hint := "usage: linewitness " + cmd.Use
	if len(args) < least {
		return usageError(verbOf(cmd)+what+" is missing", hint)
	}
	if len(args) > most {
		return usageError(fmt.Sprintf("%sunexpected argument %q", verbOf(cmd), args[most]), hint)
	}
	return nil
}
