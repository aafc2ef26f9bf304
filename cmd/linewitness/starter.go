package main

import (
	"errors"
	"io/fs"
	"os"

	"github.com/spf13/cobra"

	"linewitness/sim/design"
)

const starterHelp = `linewitness starter writes a commented design file to begin from. It is a complete
design that verifies as it stands.

  linewitness starter           to standard output
  linewitness starter FILE      to FILE, which must not exist yet; - is standard output

Example:
  linewitness starter feeder.yaml
`

func (a *app) starterCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "starter [FILE]",
		Short: "write a design file to begin from",
		Long:  starterHelp,
		Args:  atMostOne("a file name"),
		RunE: func(_ *cobra.Command, args []string) error {
			if len(args) == 0 || args[0] == "-" {
				a.stdout.Write(design.Starter())
				return nil
			}
			return createFile(args[0], design.Starter())
		},
	}
}

// createFile writes a file that must not exist. A file that could not be
// written whole is removed again.
func createFile(path string, content []byte) error {
	f, err := os.OpenFile(path, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
	if errors.Is(err, fs.ErrExist) {
		return fileError(path+" exists already", "give another name, or remove it first")
	}
	if err != nil {
		return fileError(err.Error(), "")
	}
	_, err = f.Write(content)
	if err = errors.Join(err, f.Close()); err != nil {
		os.Remove(path)
		return fileError(err.Error(), "")
	}
	return nil
}
