// Package data writes a record as JSON and as CSV, the two forms that other
// programs read.
//
// # Numbers
//
// Amplitudes are peak, units are SI, and a key or a column ends in its unit
// where it has one (at_m, time_s, power_w, phase_deg). Phases are relative to
// the EMF of the source under e^{+jwt}. The fields of a requirement are in the
// unit that the design file gave its limit in, and "unit" names it, as it does
// for the figures under Evidence; the difference of two levels in dBm is in dB. The amplitudes of a rating are in
// its "unit", V or A, and peak like all others; "rated_text" is the limit as
// the design file has it.
//
// JSON numbers have 12 significant digits: more than either witness is good for,
// and few enough that the last bits of an arithmetic unit do not show. In CSV
// files places and times have 9, amplitudes and phases 6, and the errors, which
// are small differences of amplitudes, 4. The largest sample of a waveform has 6
// too, and its other samples end at the same place.
//
// Each peak has the uncertainty of its value beside it: "uncertainty_v",
// "uncertainty_a", of a section "peak_voltage_uncertainty_v" and
// "peak_current_uncertainty_a".
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
// # Settling and power
//
// Beyond what the settling run reached, "settling" has what the closed form
// predicts of it, every comparison of two windows, and, from the stress run,
// how each place comes to its final phasor:
//
//	"settling": {..., "long_path_s", "ramp_s", "earliest_s", "passes",
//	          "predicted": {"loop_factor", "q", "time_constant_s", "to_10_percent_s",
//	                        "to_1_percent_s", "to_0_1_percent_s", "ring_down_60_db_s", "settled_s"},
//	          "windows": [{"time_s", "gap_s", "change", "estimate", "mean", "harmonic", "passed"}],
//	          "places": [{"name", "kind": "junction | load", "quantity": "voltage | current",
//	                      "to_10_percent_s", "to_1_percent_s", "to_0_1_percent_s"}],
//	          "echoes": [{"name", "time_s"}],
//	          "ring_down": {JUNCTION: {"to_minus_20_db_s", "to_minus_40_db_s", "to_minus_60_db_s"}}}
//	"power": {"phasor": AUDIT, "fdtd": AUDIT}
//	AUDIT  = {"available_w", "delivered_w", "reflected_w", "dissipated_w", "in_loads_w",
//	          "balance_w", "balance_relative", "balance_allowed", "closed", "stored_j", "q",
//	          "sections": {NAME: {"in_w", "out_w", "dissipated_w", "stored_j"}},
//	          "elements": {NAME: {"power_w"}}, "loads": {NAME: {"power_w"}}}
//
// Times are from switch-on, those of "ring_down" from the stop of the source,
// and the predicted ones from the end of the source's own rise or from its stop.
// A time that the run did not show is null. An audit is null where none was made.
//
// # Evidence
//
// "convergence" has every figure that a requirement or the summary uses on the
// grids of the study, finest first, and its error against its uncertainty;
// "fidelity" the feature selective validation (IEEE Std 1597.1) of the curves;
// "claims" the designer's own figures; and "matrix", beside "cases", the cases
// side by side:
//
//	"convergence": {"grids": [{"steps_per_period", "cells", "step_s"}], "skipped",
//	          "figures": [{"id", "quantity", "subject", "unit", "values": [..],
//	                       "behaviour": "converging | converging off order | oscillatory | diverging |
//	                                     exact | two grids | one grid",
//	                       "order", "extrapolated", "factor", "gci", "gci_percent",
//	                       "phasor", "error", "uncertainty",
//	                       "uncertainty_parts": {"grid", "settling", "form", "rounding"}, "explained"}]}
//	"fidelity": [{"subject", "curve", "points", "note", "adm": MEASURE, "fdm": MEASURE, "gdm": MEASURE}]
//	MEASURE = {"value", "word", "histogram": [6 parts], "grade", "spread"}
//	"claims": [{"id", "quantity", "subject", "unit", "complex", "claimed", "phasor", "fdtd",
//	          "tolerance", "difference", "uncertainty",
//	          "verdict": "confirmed | contradicted | not shown", "finding",
//	          "slips": [{"name", "where", "text", "value", "also": [..], "explains": [..]}],
//	          "claimed_text", "tolerance_text", "text", "source"}]
//	"matrix": {"cases": [..], "rows": [{"id", "label", "unit", "limit_text",
//	          "cells": [{"present", "value", "difference", "verdict", "worst"}]}]}
//
// A figure, a claim and a row of the matrix are in their "unit". "skipped" says
// why the study was left out, and is empty where it was made. The values of a
// claim, "claimed", "phasor", "fdtd" and the "value" of its slips, are complex
// where "complex" is true, else plain numbers; a slip "explains" the claims
// whose ids it has. A key figure has an empty "id", and in the matrix no verdict.
//
// # Waveforms
//
// The waveform file has a row for each time of a case and a column for each
// waveform, named after it: flange_v, antenna_a. Rows of part "run" are the
// stress run, those of part "tail" its last periods again, and those of part
// "phasor" the closed form at the times of the tail. The grid has its currents,
// and the voltages of junctions without a section, half a step before the other
// voltages: so each row has the fields of one of the two kinds. The file holds
// every sample that the record has. A record keeps a bounded number of samples a
// case and warns where that is less than the whole run.
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
