// Package data writes a record as JSON and as CSV, the two forms that other
// programs read.
//
// # Numbers
//
// Amplitudes are peak, units are SI, and a key or a column ends in its unit
// where it has one (at_m, time_s, power_w, phase_deg). Phases are relative to
// the EMF of the source under e^{+jwt}. The fields of a requirement alone are
// in the unit that the design file gave its limit in, and "unit" names it; the
// difference of two levels in dBm is in dB. The amplitudes of a rating are in
// its "unit", V or A, and peak like all others; "rated_text" is the limit as
// the design file has it.
//
// JSON numbers have 12 significant digits and CSV numbers 9: more than either
// witness is good for, and few enough that the last bits of an arithmetic
// unit do not show. The samples of waveforms have 7, their times 9.
//
// # Lines and ratings
//
// Each case has the kinds of line of its sections by their names, and its
// ratings, worst first:
//
//	"lines": {NAME: {"text", "model": "constant | dispersive",
//	          "series_residual", "shunt_residual", "field_per_volt_per_m",
//	          "pedigree": [{"what", "text", "kind", "note"}],
//	          "loss_fit": [{"frequency_hz", "given_db_per_m", "fitted_db_per_m", "text"}]}}
//	"ratings": [{"section", "quantity": "voltage | current", "unit": "V | A",
//	          "steady", "steady_at_m", "peak", "peak_at_m", "peak_time_s", "uncertainty",
//	          "rated", "rated_text", "source", "advisory", "derating_db", "allowed",
//	          "margin", "margin_db", "margin_percent",
//	          "verdict": "met | missed | not shown", "field_v_per_m"}]
//
// The kind of a piece of data is measured, datasheet, catalogue (the cable
// table), geometry, assumed or given. A residual is that of the rational form
// stepped in time, relative to the exact law, at worst from a tenth to ten
// times the design frequency. An advisory rating rests on the cable table: it
// warns and has no part in the verdict of the case.
//
// # Size
//
// The waveform file holds every sample that the record has, one a row: some
// 60 bytes each, mostly names, so that a compressed file is a seventh of it.
// A record keeps a bounded number of samples a case and warns where that is
// less than the whole run.
//
// # What has no number
//
// JSON knows neither infinity nor NaN. A key of the format is always there,
// and its value is null where the quantity is infinite or has no meaning: the
// VSWR of a total reflection, the impedance where no current flows, the
// available power of an ideal source, the limit of a requirement that is a
// window or a circle, the residual of a form that is not there, the field where
// no dimensions are known. In a CSV file the field is empty.
package data
