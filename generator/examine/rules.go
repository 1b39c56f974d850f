package examine

// rules is the one list, sorted by code. Before adding one, ask three
// questions: is it about correctness, does it happen, is it nearly always
// right? What was refused stays here with its reason:
//
//   - "value looks rounded": not nearly always right.
//   - "no figure in a report": not about correctness.
//   - "%IACS times resistivity is not 172.41": a record states one of the
//     two, the other is computed; two data sets that differ are told by
//     data-sets-disagree.
var rules = []Rule{
	alphaConductivityMismatch,
	authorIsReviewer,
	basisMissing,
	betaUnlikely,
	bindingOnDraft,
	bindingStudyFails,
	classCopiedIntoAlpha,
	classFigureBroken,
	classMissing,
	coefficientTableDisagree,
	coefficientTooLarge,
	coefficientUnlikely,
	conditionMissing,
	dataSetsDisagree,
	declarationAboveLimit,
	declarationExpired,
	densityUnlikely,
	emfUnlikely,
	equivalentUnknown,
	equivalentUnsigned,
	expansionUnlikely,
	factorUnlikely,
	limitsMissing,
	linkDangling,
	numberStale,
	memoryInReleased,
	offerExpired,
	offerUnusable,
	readingOrderUnknown,
	referenceOutsideRange,
	referenceUnusual,
	replacementUnknown,
	resistivityUnlikely,
	reviewDue,
	signOffMissing,
	sourceSuperseded,
	sourceUnknown,
	rangeTooWideForLine,
	supersederUnknown,
	thermalConductivityUnlikely,
	turningPointHidden,
	uncertaintyWithoutK,
	withdrawnInUse,
}
