// Package line turns what a designer knows of a line into its primary
// constants per metre. It solves nothing: how a wave travels on a line is
// worked out by each witness for itself. What the package says of propagation
// serves to turn an electrical length into metres and to echo the input in
// other forms.
package line
