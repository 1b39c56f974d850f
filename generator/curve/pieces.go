package curve

import (
	"errors"
	"fmt"
	"math"
)

// Pieces joins curves that follow one another, ascending: each begins where the
// one before ends, within the slack, and the values there agree within
// tolerance of that joint, relative to the lower piece. The lower piece owns the shared edge.
// The error is a Gap, or says that there is nothing to join.
func Pieces(curves []Curve, tolerance func(joint int) float64) (Curve, error) {
	var out Curve
	for i, c := range curves {
		if len(c.Segments) == 0 {
			return Curve{}, fmt.Errorf("piece %d has no curve", i+1)
		}
		piece := append([]Segment(nil), c.Segments...)
		if n := len(out.Segments); n > 0 {
			if err := joins(&out.Segments[n-1], &piece[0], tolerance(i-1)); err != nil {
				return Curve{}, err
			}
			piece[0].From = out.Segments[n-1].To
		}
		out.Segments = append(out.Segments, piece...)
		out.FromTable = out.FromTable || c.FromTable
	}
	if len(out.Segments) == 0 {
		return Curve{}, errors.New("there are no pieces")
	}
	return out, nil
}

// A Gap is the error of two pieces that do not join.
type Gap struct {
	To, From     float64 // K: where the lower piece ends and the upper begins
	Below, Above float64 // their values there
}

// Error says whether the temperatures or the values do not meet.
func (e Gap) Error() string {
	if math.Abs(e.To-e.From) > slack {
		return fmt.Sprintf("one piece ends at %s, the next begins at %s", celsius(e.To), celsius(e.From))
	}
	return fmt.Sprintf("at %s the lower piece gives %.6g, the upper %.6g: %.3g %% apart",
		celsius(e.To), e.Below, e.Above, 100*math.Abs(e.Above/e.Below-1))
}

func joins(lower, upper *Segment, tolerance float64) error {
	gap := Gap{lower.To, upper.From, lower.value(lower.To), upper.value(upper.From)}
	if math.Abs(gap.To-gap.From) > slack {
		return gap
	}
	if !(math.Abs(gap.Above-gap.Below) <= float64(tolerance*math.Abs(gap.Below))) {
		return gap
	}
	return nil
}
