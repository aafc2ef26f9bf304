// Package gci estimates how far a value found on a grid is from the value on
// an infinitely fine one: the grid convergence index.
//
// Celik is the published procedure for three grids, with nothing added. It
// takes any three values for a converging sequence: the absolute value in its
// equation for the order turns a diverging sequence into a converging one.
// Study looks first at how the values go with the grid, says it in a word, and
// chooses the factor of safety and the order that go with the word.
//
// # Notation
//
// Grids are numbered from the finest: steps h1 < h2 < h3, values phi1, phi2,
// phi3, ratios r21 = h2/h1 and r32 = h3/h2, changes e21 = phi2 - phi1 and
// e32 = phi3 - phi2. The order is p in phi = phi0 + C h^p.
//
// # Sources
//
// Celik, Ghia, Roache, Freitas, Coleman, Raad, Procedure for estimation and
// reporting of uncertainty due to discretization in CFD applications, J. Fluids
// Eng. 130(7):078001, 2008; the same formulas are in ASME V&V 20-2009. Both
// were not read in the original: the formulas and the table are taken from
// restatements and from test data that quote them, and were recomputed. The
// factor 3 with a limited order, for values that do not converge as they
// should, follows Oberkampf and Roy, Verification and Validation in Scientific
// Computing, 2010, section 8.7, from memory.
package gci
