package site

// term is one word of the trade, told in two sentences.
type term struct{ ID, Term, Text string }

// terms are in alphabetical order.
var terms = []term{
	{"alpha", "α, linear coefficient", "The slope of the curve at its reference temperature, over the value there. It belongs to that temperature: copper has 3930 ppm/K at 20 °C and 4265 ppm/K at 0 °C."},
	{"band", "band", "What the stated limits leave open: at each temperature the lowest and highest value that any corner of the limits gives. The note under a table says which numbers it covers, and a missing ± is unknown, not zero."},
	{"basis", "basis", "What was measured: the resistance of a fixed body, or the resistivity corrected for thermal expansion. The two differ by the linear expansion, which for a low-TCR alloy is more than its whole specification."},
	{"beta", "β, quadratic coefficient", "How fast the slope itself changes, in ppm/K². A negative β makes a curve that rises, turns and falls."},
	{"box", "box coefficient", "The whole spread of R over a window, over R at the reference temperature and the width of the window. It has no sign, and misses nothing that happens inside the window."},
	{"change", "change", "How much R differs from its value at the reference temperature, in ppm or %. The greatest change over a window is the one of largest magnitude, with its sign and its temperature."},
	{"checked", "checked", "Against what a value was compared: the original, somebody's transcription of it, or memory alone. A value from memory is never released."},
	{"chord", "chord", "The mean coefficient between two temperatures, counted from the reference temperature. A cold and a hot chord of the same curve differ, even in sign."},
	{"class", "class of a value", "Specified, typical, measured, calculated or textbook. A typical value says what to expect and never forms limits."},
	{"declaration", "declaration", "What a document states of a restricted substance: the greatest content by mass, counted on each homogeneous material or on the article. It holds until its last day."},
	{"edition", "edition", "What the whole reference stated at one time, frozen under a name and never altered. Each material tells in its history what changed since."},
	{"equivalent", "equivalent", "Another designation that may stand for this material: the same, near, or not acceptable. The verdict holds for the use it names and for no other."},
	{"extrapolated", "extrapolated", "Beyond the valid range, by the formula alone. Such a number is a guess; it is given only when somebody asks for it in so many words, and marked wherever it appears."},
	{"fingerprint", "fingerprint", "A short code made from what a record states. When any stated value changes it changes, so two sheets with the same fingerprint say the same."},
	{"limit", "limit", "What a specification allows, written ± 5 % or as a range. Limits combine as the worst case."},
	{"margin", "margin", "How much of a requirement is left: (limit − worst value)/limit. A negative margin fails."},
	{"ratio", "R/R", "The resistance of a fixed body over its value at the reference temperature. The resistivity cancels, so limits of the resistivity give no band for it."},
	{"reference-temperature", "reference temperature", "The temperature that a resistivity and its coefficients are told about. 20 °C is usual; 0, 23, 25 and 27 °C are found too, and coefficients must be converted between them."},
	{"slope", "slope", "The coefficient at one temperature, (1/R)·dR/dT. It says little about what happens far from there."},
	{"turning-point", "turning point", "The temperature at which R stops rising or falling. For a parabola it lies at T_ref − α/(2β)."},
	{"uncertainty", "uncertainty", "What a measurement leaves open, written ± 0.4 % (k=2) with its coverage factor. Uncertainties combine by JCGM 100 and are never added to limits in silence."},
	{"valid-range", "valid range", "The closed range of temperature that the data cover. Outside it this reference gives no value, and curves end there."},
}
