package recheck

// evidence are the rules of the grid study, of the curves, of the cases side by
// side and of the figures in time.
var evidence = []rule{
	{[]string{"cases.*.convergence.figures.[].values.[]"}, ofStudy, "within the uncertainty of the figure"},
	{[]string{"cases.*.convergence.figures.[].phasor|extrapolated|error"}, own("uncertainty"), "within the uncertainty of the figure"},
	{[]string{"cases.*.convergence.figures.[].uncertainty|gci"}, estimated("values"), "an uncertainty is known to one digit"},
	{[]string{"cases.*.convergence.figures.[].uncertainty_parts.*"}, estimated("../values"), "an uncertainty is known to one digit"},
	{[]string{"cases.*.convergence.figures.[].gci_percent"}, estimated(), "an index is known to one digit"},
	{[]string{"cases.*.convergence.figures.[].order"}, order, "an order is judged in tenths"},
	{[]string{"cases.*.convergence.figures.[].factor"}, given, "it follows from the behaviour"},
	{[]string{"cases.*.convergence.figures.[].behaviour"}, graded("order", "gci", "error"), "it follows from the figures beside it"},
	{[]string{"cases.*.convergence.skipped"}, withFigures, "a sentence: its words, and its figures to the last digit"},
	{[]string{"cases.*.convergence.figures.[].id|quantity|subject|unit|explained"}, exact, "a name, or whether the error is explained"},

	{[]string{"cases.*.fidelity.[].points"}, exact, "a count: another is another grid"},
	{[]string{"cases.*.fidelity.[].adm|fdm|gdm.value"}, measure, "the grades of a difference measure are a tenth wide and more"},
	{[]string{"cases.*.fidelity.[].adm|fdm|gdm.histogram.[]"}, portion, "two points may change their grade"},
	{[]string{"cases.*.fidelity.[].adm|fdm|gdm.grade|spread"}, category, "85 % of the points may be reached one grade sooner or later"},
	{[]string{"cases.*.fidelity.[].adm|fdm|gdm.word"}, graded("value"), "it follows from the figure beside it"},
	{[]string{"cases.*.fidelity.[].subject|curve"}, exact, "a name"},
	{[]string{"cases.*.fidelity.[].note"}, withFigures, "a sentence: its words, and its figures to the last digit"},

	{[]string{"matrix.rows.[].cells.[].value"}, cellValue, "within the uncertainty of the figure in its case"},
	{[]string{"matrix.rows.[].cells.[].difference"}, cellDifference, "within the uncertainties of the figure in both cases"},
	{[]string{"matrix.rows.[].cells.[].worst"}, pick("value"), "of equal margins, rounding chooses the worst"},
	{[]string{"matrix.cases.[]", "matrix.rows.[].id|label|unit|limit_text", "matrix.rows.[].cells.[].present|verdict"}, exact, "from the design file, or a verdict"},

	{[]string{"cases.*.space_time.path.[].section|reversed", "cases.*.space_time.quantity", "cases.*.bounces.sections.[].section|from|to", "cases.*.bounces.coefficients.[].junction", "cases.*.bounces.arrivals.[].junction|section"}, exact, "a name"},
	{[]string{"cases.*.space_time.rows|columns"}, exact, "a count: another is another run or another grid"},
	{[]string{"cases.*.space_time.phase_deg"}, peakPhase(mapped), "the phase of the peak, which is a crest over the start phase"},
	{[]string{
		"cases.*.space_time.path.[].from_m|to_m", "cases.*.bounces.sections.[].z0_ohm|delay_s|kept",
		"cases.*.bounces.coefficients.[].from_left|from_right|through_right|through_left", "cases.*.bounces.arrivals.[].time_s|step_v|voltage_v",
	}, computed, "a closed form, without a grid"},
	{[]string{"cases.*.bounces.note"}, withFigures, "a sentence: its words, and its figures to the last digit"},
}
