// Package line turns what a designer knows of a line into its primary
// constants per metre. It solves nothing: how a wave travels on a line is
// worked out by each witness for itself.
package line
