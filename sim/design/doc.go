// Package design reads design files: YAML 1.2 to positioned nodes by a
// library, then a strict walker of our own that knows every key, unit and
// rule, collects every problem in one pass and gives each its place, its
// source line and a hint.
package design
