package study

// Broken lists the answers by which a binding decision does not hold: none for
// a study that does not bind. Every material of a study must hold, but of a
// choice one is enough.
func (o *Outcome) Broken() []MaterialOutcome {
	if !o.Binding {
		return nil
	}
	var list []MaterialOutcome
	for _, m := range o.Materials {
		switch {
		case m.Verdict == Holds && o.Choice:
			return nil
		case m.Verdict != Holds && m.Verdict != NotAsked:
			list = append(list, m)
		}
	}
	return list
}

// Chosen lists the answers that the decision rests on: those that hold of a
// choice, otherwise all.
func (o *Outcome) Chosen() []MaterialOutcome {
	if !o.Choice {
		return o.Materials
	}
	var list []MaterialOutcome
	for _, m := range o.Materials {
		if m.Verdict == Holds || m.Verdict == HoldsNominally {
			list = append(list, m)
		}
	}
	return list
}
