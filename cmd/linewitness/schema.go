package main

import (
	"github.com/spf13/cobra"

	"linewitness/sim/design"
)

const schemaHelp = `linewitness schema prints the JSON Schema of the design file, for editors that check
and complete YAML by a schema. What the schema cannot express, verify and plan check.

  linewitness schema

Example, with a first line in the design file that many editors understand:
  linewitness schema > design.schema.json
  # yaml-language-server: $schema=design.schema.json
`

func (a *app) schemaCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "schema",
		Short: "the JSON Schema of the design file",
		Long:  schemaHelp,
		Args:  noArgs,
		RunE: func(*cobra.Command, []string) error {
			a.stdout.Write(design.Schema())
			return nil
		},
	}
}
