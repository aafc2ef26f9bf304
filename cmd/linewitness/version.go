package main

import (
	"fmt"
	"runtime"
	"runtime/debug"

	"github.com/spf13/cobra"
)

const versionHelp = `linewitness version prints the version, the toolchain and the platform on one line.
The same version stands in every record.

  linewitness version
`

func (a *app) versionCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "version",
		Short: "the version of this program",
		Long:  versionHelp,
		Args:  noArgs,
		RunE: func(*cobra.Command, []string) error {
			fmt.Fprintln(a.stdout, versionLine())
			return nil
		},
	}
}

func versionLine() string {
	return fmt.Sprintf("linewitness %s %s %s/%s", version(), runtime.Version(), runtime.GOOS, runtime.GOARCH)
}

// version is the version of the program from its build information: the
// module's version where it has one, and the revision it was built from.
func version() string {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return "unknown"
	}
	return versionOf(info)
}

// revisionLength is the number of hex digits of a revision that are printed.
const revisionLength = 12

func versionOf(info *debug.BuildInfo) string {
	v := info.Main.Version
	if v == "" {
		v = "(devel)"
	}
	var revision, modified string
	for _, s := range info.Settings {
		switch s.Key {
		case "vcs.revision":
			revision = s.Value[:min(len(s.Value), revisionLength)]
		case "vcs.modified":
			if s.Value == "true" {
				modified = "+changes"
			}
		}
	}
	if revision == "" {
		return v
	}
	return v + " (" + revision + modified + ")"
}
