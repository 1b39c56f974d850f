package sheet

import (
	"math"

	"github.com/signintech/gopdf"
)

// A curve is written as a filled ribbon of its own width: the PDF library knows
// no open line of many corners, and dashes cut here run on from corner to
// corner.

// tolerance is how far a line may leave its corners when those on nearly
// straight stretches are left out: a fortieth of a point is under what a
// printer shows.
const tolerance = 0.025

// simple leaves out corners that lie on the straight line between those that
// stay.
func simple(line []gopdf.Point) []gopdf.Point {
	if len(line) < 3 {
		return line
	}
	out := line[:1:1]
	for i := 0; i < len(line)-1; {
		j := i + 1
		for j+1 < len(line) && straight(line[i:j+2]) {
			j++
		}
		out, i = append(out, line[j]), j
	}
	return out
}

// straight tells that every corner between the ends lies near their line.
func straight(part []gopdf.Point) bool {
	a, b := part[0], part[len(part)-1]
	x, y := unit(a, b)
	for _, p := range part[1 : len(part)-1] {
		if math.Abs((p.X-a.X)*y-(p.Y-a.Y)*x) > tolerance {
			return false
		}
	}
	return true
}

// dashed cuts a line of many corners into the pieces that its dash leaves.
func dashed(line []gopdf.Point, dash []float64) [][]gopdf.Point {
	if len(dash) == 0 {
		return [][]gopdf.Point{line}
	}
	var pieces [][]gopdf.Point
	k, left, on := 0, dash[0], true
	piece := []gopdf.Point{line[0]}
	for i := 1; i < len(line); i++ {
		a, b := line[i-1], line[i]
		for length := math.Hypot(b.X-a.X, b.Y-a.Y); ; {
			if length <= left {
				left -= length
				piece = append(piece, b)
				break
			}
			cut := gopdf.Point{X: a.X + (b.X-a.X)*left/length, Y: a.Y + (b.Y-a.Y)*left/length}
			if on {
				pieces = append(pieces, append(piece, cut))
			}
			length -= left
			k++
			on, left, a, piece = !on, dash[k%len(dash)], cut, []gopdf.Point{cut}
		}
	}
	if on && len(piece) > 1 {
		pieces = append(pieces, piece)
	}
	return pieces
}

// ribbon is the outline of a line of the given width: there on one side, back
// on the other. Corners of a smooth curve are nearly straight; a sharp one is
// cut off at twice the width.
func ribbon(line []gopdf.Point, width float64) []gopdf.Point {
	n := len(line)
	out := make([]gopdf.Point, 2*n)
	for i := range line {
		before, after := line[max(i-1, 0)], line[min(i+1, n-1)]
		x1, y1 := unit(before, line[i])
		x2, y2 := unit(line[i], after)
		if i == 0 {
			x1, y1 = x2, y2
		}
		if i == n-1 {
			x2, y2 = x1, y1
		}
		nx, ny := -(y1 + y2), x1+x2
		length := math.Hypot(nx, ny)
		if length < 1e-9 {
			nx, ny, length = -y1, x1, 1
		}
		// The middle of both normals, as long as both sides need.
		nx, ny = nx/length, ny/length
		reach := width / 2 / math.Max(0.5, math.Abs(-y1*nx+x1*ny))
		out[i] = gopdf.Point{X: line[i].X + nx*reach, Y: line[i].Y + ny*reach}
		out[2*n-1-i] = gopdf.Point{X: line[i].X - nx*reach, Y: line[i].Y - ny*reach}
	}
	return out
}

func unit(a, b gopdf.Point) (x, y float64) {
	l := math.Hypot(b.X-a.X, b.Y-a.Y)
	if l == 0 {
		return 0, 0
	}
	return (b.X - a.X) / l, (b.Y - a.Y) / l
}
