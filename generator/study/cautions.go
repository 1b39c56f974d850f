package study

// The cautions of the trade. Each study shows those that apply, in body-text
// size and beside its numbers. Common practice; local codes come first.
const (
	CautionNotApproval = "A verdict is a calculation from recorded values, not an approval. Verify by test."
	CautionCodes       = "Local codes, the applicable product standards and licensed practice come first."
	CautionHot         = "Conductors that carry large currents and heating elements get hot enough to burn skin and to start a fire. Computed temperatures are averages; hot spots are hotter."
	CautionHeater      = "Every heater has an independent over-temperature cut-out and earth-fault protection."
	CautionIsolate     = "Isolate, lock out and discharge before measuring."
	CautionBattery     = "Battery circuits: mind the prospective fault current and the direct-current arc; fuse the sense leads at the tap."
	CautionInductive   = "Breaking current in an inductive winding makes dangerous voltage: let it decay, and discharge before touching a terminal."
	CautionProtective  = "Never let one of these numbers be the only means of a protective function."
)

// comparisonCautions go with every comparison that someone may choose a part by.
var comparisonCautions = []string{CautionNotApproval, CautionHot, CautionIsolate, CautionProtective, CautionCodes}

// ShuntCautions go with a shunt that is sized in the browser.
func ShuntCautions() []string {
	return []string{CautionNotApproval, CautionHot, CautionBattery, CautionIsolate, CautionProtective, CautionCodes}
}

// SheetCautions go with every sheet and with the page of decisions.
func SheetCautions() []string { return append([]string{}, comparisonCautions...) }
