package recheck

// A rule says how the values at some paths are compared, and why so.
type rule struct {
	paths []string
	class class
	why   string
}

var (
	topVoltage     = peakKeys{value: "value_v", uncertainty: "uncertainty_v", time: "time_s"}
	topCurrent     = peakKeys{value: "value_a", uncertainty: "uncertainty_a", time: "time_s"}
	alongVoltage   = peakKeys{value: "peak_voltage_v", uncertainty: "peak_voltage_uncertainty_v", steady: "steady_voltage_v"}
	alongCurrent   = peakKeys{value: "peak_current_a", uncertainty: "peak_current_uncertainty_a"}
	rated          = peakKeys{value: "peak", uncertainty: "uncertainty", steady: "steady"}
	mapped         = peakKeys{value: "../stress/peak_voltage/value_v", uncertainty: "../stress/peak_voltage/uncertainty_v", time: "../stress/peak_voltage/time_s"}
	settleTolerant = below(func(at *place) float64 { return orNothing(at.now[0].Float("design", "settle_tolerance")) })
	balanced       = below(func(at *place) float64 { return orNothing(at.beside("balance_allowed")) })
	balancedPower  = below(func(at *place) float64 {
		return orNothing(at.beside("balance_allowed") * (at.beside("delivered_w") + at.network().power()))
	})
)

// rules is the table. In a path * is any name and [] any item of a list; words
// with a bar between are alternatives. The first rule that fits holds.
var rules = []rule{
	// The document.
	{[]string{"tool.version", "tool.go"}, said, "another version of the program or of its tools is what a recheck is for"},
	{[]string{"format", "verdict", "cases.*.verdict"}, exact, "a verdict is the outcome; it may not change"},
	{[]string{"design.agreement_limit", "design.settle_tolerance", "design.max_periods"}, given, "from the design file"},
	{[]string{
		"design.number|revision|title|sha256|file|convention|date|date_from", "design.history.[].*", "design.fsv_choices.[]",
	}, exact, "from the design file, or a name"},
	{[]string{"cases.*.frequency_hz"}, given, "from the design file"},
	{[]string{"cases.*.warnings.[]"}, withFigures, "a warning: its words, and its figures to the last digit"},

	// Lines.
	{[]string{"cases.*.lines.*.text|model", "cases.*.lines.*.pedigree.[].*", "cases.*.lines.*.loss_fit.[].text"}, exact, "from the design file"},
	{[]string{"cases.*.lines.*.loss_fit.[].frequency_hz|given_db_per_m"}, given, "from the design file"},
	{[]string{
		"cases.*.lines.*.series_residual|shunt_residual|field_per_volt_per_m", "cases.*.lines.*.loss_fit.[].fitted_db_per_m",
	}, computed, "a fit or a closed form, without a grid"},

	// Steady state.
	{[]string{"cases.*.phasor|fdtd.source.available_power_w", "cases.*.power.phasor|fdtd.available_w"}, given, "from the design file"},
	{[]string{"cases.*.phasor|fdtd.source.v", "cases.*.phasor|fdtd.loads|junctions.*.v"}, ofNetwork(func(s spread) float64 { return s.v }), "a voltage is known to the difference of the two solutions, of the network's largest"},
	{[]string{"cases.*.phasor|fdtd.source.i", "cases.*.phasor|fdtd.loads.*.i"}, ofNetwork(func(s spread) float64 { return s.i }), "a current is known to the difference of the two solutions, of the network's largest"},
	{[]string{"cases.*.phasor|fdtd.sections.*.from|to.v", "cases.*.phasor|fdtd.sections.*.voltage_max|voltage_min.value_v", "cases.*.agreement.sections.*.voltage_scale_v", "cases.*.stress.sections.*.steady_voltage_v"}, ofSteady(func(s spread) float64 { return s.v }), "a voltage is known to the difference of the two solutions, of the section's largest"},
	{[]string{"cases.*.phasor|fdtd.sections.*.from|to.i", "cases.*.phasor|fdtd.sections.*.current_max.value_a", "cases.*.agreement.sections.*.current_scale_a"}, ofSteady(func(s spread) float64 { return s.i }), "a current is known to the difference of the two solutions, of the section's largest"},
	{[]string{"cases.*.phasor|fdtd.source.impedance", "cases.*.phasor|fdtd.sections.*.from|to.impedance"}, impedance, "a quotient of a voltage and a current, each known to the difference of the two solutions"},
	{[]string{"cases.*.phasor|fdtd.sections.*.from|to.reflection"}, reflection, "from such a quotient"},
	{[]string{"cases.*.phasor|fdtd.sections.*.from|to.vswr"}, vswr, "from the size of the reflection"},
	{[]string{"cases.*.phasor|fdtd.source.power_w", "cases.*.phasor|fdtd.loads.*.power_w"}, terminal, "a product of a voltage and a current, each known to the difference of the two solutions"},
	{[]string{"cases.*.phasor|fdtd.sections.*.loss_w", "cases.*.power.phasor|fdtd.sections.*.dissipated_w"}, ofSteady(func(s spread) float64 { return 2 * s.power() }), "a difference of two powers"},
	{[]string{"cases.*.phasor|fdtd.sections.*.voltage_max|voltage_min|current_max.at_m"}, crest(""), "a crest is flat: a small error of its height moves it far"},

	// Power.
	{[]string{"cases.*.power.phasor|fdtd.sections.*.in_w|out_w"}, ofSteady(spread.power), "a product of a voltage and a current, each known to the difference of the two solutions"},
	{[]string{"cases.*.power.phasor|fdtd.delivered_w|reflected_w|dissipated_w|in_loads_w", "cases.*.power.phasor|fdtd.loads|elements.*.power_w"}, ofNetwork(func(s spread) float64 { return 2 * s.power() }), "a sum of products of a voltage and a current of the network"},
	{[]string{"cases.*.power.phasor|fdtd.balance_relative"}, balanced, "a balance that closes is a rounding: below what is allowed it is the same"},
	{[]string{"cases.*.power.phasor|fdtd.balance_w"}, balancedPower, "a balance that closes is a rounding: below what is allowed it is the same"},
	{[]string{"cases.*.power.phasor|fdtd.balance_allowed"}, estimated(), "an allowance is an estimate, known to one digit"},
	{[]string{"cases.*.power.phasor|fdtd.closed"}, exact, "whether the balance closes is part of the verdict"},
	{[]string{"cases.*.power.phasor|fdtd.stored_j", "cases.*.power.phasor|fdtd.sections.*.stored_j"}, stored, "energy goes with the square of a phasor"},
	{[]string{"cases.*.power.phasor|fdtd.q"}, quality, "energy over power"},

	// Settling.
	{[]string{"cases.*.settling.settled", "cases.*.settling.places.[].name|kind|quantity", "cases.*.settling.echoes.[].name"}, exact, "a name, or whether there is a steady state"},
	{[]string{"cases.*.settling.decay"}, withFigures, "a sentence: its words, and its figures to the last digit"},
	{[]string{"cases.*.settling.periods|passes"}, exact, "the run ends at whole periods: another number is another run"},
	{[]string{"cases.*.settling.time_s|to_1_percent_s", "cases.*.settling.windows.[].time_s|gap_s", "cases.*.settling.places.[].to_10_percent_s|to_1_percent_s|to_0_1_percent_s", "cases.*.settling.ring_down.*.*", "cases.*.stress.duration_s", "cases.*.space_time.until_s"}, period, "a time of a run is known to one period"},
	{[]string{"cases.*.settling.residual|mean|harmonic", "cases.*.settling.windows.[].change|estimate|mean|harmonic"}, settleTolerant, "a remainder below the settling tolerance is the same as another; above, it is known to one digit"},
	{[]string{"cases.*.settling.windows.[].passed"}, graded("change", "estimate", "mean", "harmonic"), "it follows from the figures beside it"},
	{[]string{"cases.*.settling.loop_factor"}, echo, "a ratio of two small changes"},
	{[]string{"cases.*.settling.round_trip_s|long_path_s|ramp_s|earliest_s", "cases.*.settling.predicted.*", "cases.*.settling.echoes.[].time_s"}, computed, "a closed form or an iteration, without a grid"},

	// Stress.
	{[]string{"cases.*.stress.profile|phase"}, exact, "from the design file"},
	{[]string{"cases.*.stress.peak_voltage.value_v"}, own("uncertainty_v"), "within the uncertainty of the peak"},
	{[]string{"cases.*.stress.peak_current.value_a"}, own("uncertainty_a"), "within the uncertainty of the peak"},
	{[]string{"cases.*.stress.peak_voltage.section"}, rival("value_v", "uncertainty_v", "../sections", "peak_voltage_v"), "of sections with equal peaks, rounding chooses"},
	{[]string{"cases.*.stress.peak_current.section"}, rival("value_a", "uncertainty_a", "../sections", "peak_current_a"), "of sections with equal peaks, rounding chooses"},
	{[]string{"cases.*.stress.peak_voltage.at_m"}, crest("uncertainty_v"), "a crest is flat: a small error of its height moves it far"},
	{[]string{"cases.*.stress.peak_current.at_m"}, crest("uncertainty_a"), "a crest is flat: a small error of its height moves it far"},
	{[]string{"cases.*.stress.peak_voltage.time_s"}, peakTime(topVoltage), "one period; a peak that is the steady crest returns with every one"},
	{[]string{"cases.*.stress.peak_current.time_s"}, peakTime(topCurrent), "one period; a peak that is the steady crest returns with every one"},
	{[]string{"cases.*.stress.peak_voltage.phase_deg"}, peakPhase(topVoltage), "the peak is a crest over the start phase too"},
	{[]string{"cases.*.stress.peak_current.phase_deg"}, peakPhase(topCurrent), "the peak is a crest over the start phase too"},
	{[]string{"cases.*.stress.overshoot"}, overshoot, "a peak over a steady value, each with its uncertainty"},
	{[]string{"cases.*.stress.sections.*.peak_voltage_v"}, own("peak_voltage_uncertainty_v"), "within the uncertainty of the peak"},
	{[]string{"cases.*.stress.sections.*.peak_current_a"}, own("peak_current_uncertainty_a"), "within the uncertainty of the peak"},
	{[]string{"cases.*.stress.sections.*.at_m"}, crest("peak_voltage_uncertainty_v"), "a crest is flat: a small error of its height moves it far"},
	{[]string{"cases.*.stress.sections.*.current_at_m"}, crest("peak_current_uncertainty_a"), "a crest is flat: a small error of its height moves it far"},
	{[]string{"cases.*.stress.sections.*.time_s"}, peakTime(alongVoltage), "one period; a peak that is the steady crest returns with every one"},
	{[]string{"cases.*.stress.sections.*.current_time_s"}, peakTime(alongCurrent), "one period; a peak that is the steady crest returns with every one"},
	{[]string{"cases.*.stress.peak_voltage.uncertainty_v", "cases.*.stress.peak_current.uncertainty_a"}, estimated("value_v", "value_a"), "an uncertainty is known to one digit"},
	{[]string{"cases.*.stress.sections.*.peak_voltage_uncertainty_v"}, estimated("peak_voltage_v"), "an uncertainty is known to one digit"},
	{[]string{"cases.*.stress.sections.*.peak_current_uncertainty_a"}, estimated("peak_current_a"), "an uncertainty is known to one digit"},

	// Agreement.
	{[]string{"cases.*.agreement.limit"}, given, "from the design file"},
	{[]string{"cases.*.agreement.voltage|current|rms|expected", "cases.*.agreement.sections.*.voltage|current|voltage_expected|current_expected"}, discrepancy, "a difference of the two solutions is known to a twentieth, and to what is left of the settling"},
	{[]string{"cases.*.agreement.worst.section|quantity"}, pick("../voltage", "../current"), "of sections with equal differences, rounding chooses"},
	{[]string{"cases.*.agreement.worst.at_m", "cases.*.agreement.sections.*.voltage_at_m|current_at_m"}, anywhere, "differences are nearly equal at many places"},

	// Grid.
	{[]string{"cases.*.grid.steps_per_period", "cases.*.grid.sections.*.cells|points", "cases.*.convergence.grids.[].steps_per_period|cells"}, exact, "a count: another is another grid"},
	{[]string{"cases.*.grid.step_s|cell_updates", "cases.*.grid.sections.*.courant|cells_per_wavelength|cell_m|phase_error_deg", "cases.*.convergence.grids.[].step_s"}, computed, "it follows from the design and the grid"},

	// Requirements, ratings and claims.
	{[]string{"cases.*.requirements.[].value|margin"}, own("uncertainty"), "within the uncertainty of the requirement"},
	{[]string{"cases.*.requirements.[].limit|min|max"}, given, "from the design file"},
	{[]string{"cases.*.requirements.[].margin_db"}, inDB("uncertainty", "value"), "within the uncertainty of the requirement, in dB"},
	{[]string{"cases.*.requirements.[].margin_percent"}, inPercent("uncertainty", "limit"), "within the uncertainty of the requirement, in per cent"},
	{[]string{"cases.*.requirements.[].uncertainty"}, estimated("value"), "an uncertainty is known to one digit"},
	{[]string{"cases.*.requirements.[].method"}, pick("value"), "of two equal solutions, rounding chooses the worse"},
	{[]string{"cases.*.requirements.[].note"}, withFigures, "a sentence: its words, and its figures to the last digit"},
	{[]string{"cases.*.requirements.[].id|quantity|subject|section|unit|verdict|limit_text|text|source"}, exact, "from the design file, or a verdict"},
	{[]string{"cases.*.ratings.[].peak|margin"}, own("uncertainty"), "within the uncertainty of the rating"},
	{[]string{"cases.*.ratings.[].steady"}, ratedSteady, "known to the difference of the two solutions"},
	{[]string{"cases.*.ratings.[].steady_at_m"}, crest(""), "a crest is flat: a small error of its height moves it far"},
	{[]string{"cases.*.ratings.[].peak_at_m"}, crest("uncertainty"), "a crest is flat: a small error of its height moves it far"},
	{[]string{"cases.*.ratings.[].peak_time_s"}, peakTime(rated), "one period; a peak that is the steady crest returns with every one"},
	{[]string{"cases.*.ratings.[].rated|derating_db|allowed"}, given, "from the design file or the cable table"},
	{[]string{"cases.*.ratings.[].margin_db"}, ratedDB, "within the uncertainty of the rating, in dB"},
	{[]string{"cases.*.ratings.[].margin_percent"}, inPercent("uncertainty", "allowed"), "within the uncertainty of the rating, in per cent"},
	{[]string{"cases.*.ratings.[].field_v_per_m"}, ratedField, "as uncertain as the voltage that makes it"},
	{[]string{"cases.*.ratings.[].uncertainty"}, estimated("peak"), "an uncertainty is known to one digit"},
	{[]string{"cases.*.ratings.[].section|quantity|unit|rated_text|source|advisory|verdict"}, exact, "from the design file, or a verdict"},
	{[]string{"cases.*.claims.[].phasor|fdtd|difference", "cases.*.claims.[].slips.[].value"}, ofClaim, "within the uncertainty of the claim"},
	{[]string{"cases.*.claims.[].claimed|tolerance"}, given, "from the design file"},
	{[]string{"cases.*.claims.[].uncertainty"}, estimated("fdtd"), "an uncertainty is known to one digit"},
	{[]string{"cases.*.claims.[].finding", "cases.*.claims.[].slips.[].text"}, withFigures, "a sentence: its words, and its figures to the last digit"},
	{[]string{"cases.*.claims.[].id|quantity|subject|unit|complex|verdict|claimed_text|tolerance_text|text|source", "cases.*.claims.[].slips.[].name|where", "cases.*.claims.[].slips.[].also|explains.[]"}, exact, "from the design file, a name or a verdict"},
}
