// Package format turns the numbers of a record into text. It is the only
// place where that is done, so that every page writes a quantity alike:
//
//   - four significant digits and an engineering prefix, "1.375 kV";
//   - the minus sign U+2212, and a no-break space before the unit;
//   - "infinite" for an infinity and a dash for what does not apply (NaN);
//   - complex numbers as "50.01 − j0.03 Ω" or "1.315 kV at −59.10°".
//
// Markup: the runes Sup, Sub and End, which no text of a user can hold,
// enclose superscripts and subscripts; package typeset draws them so.
package format
