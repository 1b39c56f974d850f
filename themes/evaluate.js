// The evaluator: it knows segments only, as the program lowers every curve to
// them. A segment is [from, to, centre, c0, c1, c2, c3] in kelvin, and its
// value is c0 + c1·d + c2·d² + c3·d³ with d = T − centre. A curve is a list of
// segments that adjoin; the lower one owns a shared edge.
"use strict";

var evaluate = (function () {
  var slack = 1e-9; // of the closed range, in kelvin

  function owner(curve, t) {
    for (var i = 0; i < curve.length; i++) {
      if (t <= curve[i][1] + (i === curve.length - 1 ? slack : 0)) {
        return t >= curve[i][0] - slack ? curve[i] : null;
      }
    }
    return null;
  }

  function valueIn(s, t) {
    var d = t - s[2];
    return s[3] + d * (s[4] + d * (s[5] + d * s[6]));
  }

  // value at t (K); null outside the range.
  function value(curve, t) {
    var s = owner(curve, t);
    return s ? valueIn(s, t) : null;
  }

  function range(curve) {
    return [curve[0][0], curve[curve.length - 1][1]];
  }

  // The temperatures where a segment's slope is zero, from the quadratic
  // c1 + 2·c2·d + 3·c3·d²; the numerically stable form of its roots.
  function turns(s) {
    var a = 3 * s[6], b = 2 * s[5], c = s[4];
    if (a === 0) return b === 0 ? [] : [s[2] - c / b];
    var root = b * b - 4 * a * c;
    if (root < 0) return [];
    var q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(root)) / 2;
    return q === 0 ? [s[2]] : [s[2] + q / a, s[2] + c / q];
  }

  // Exact extremes over [lo, hi]; null when an edge lies outside the range.
  function extremes(curve, lo, hi) {
    if (!owner(curve, lo) || !owner(curve, hi)) return null;
    var r = { min: Infinity, max: -Infinity, minAt: lo, maxAt: lo };
    curve.forEach(function (s) {
      var from = Math.max(s[0], lo), to = Math.min(s[1], hi);
      if (from > to + slack) return;
      [from, to].concat(turns(s)).forEach(function (t) {
        if (t < from || t > to) return;
        var v = valueIn(s, t);
        if (v < r.min) { r.min = v; r.minAt = t; }
        if (v > r.max) { r.max = v; r.maxAt = t; }
      });
    });
    return r;
  }

  // Greatest change over [lo, hi], counted from the value at the reference:
  // the signed one of largest magnitude, with its temperature.
  function change(curve, reference, lo, hi) {
    var at = value(curve, reference), e = extremes(curve, lo, hi);
    if (at === null || at === 0 || e === null) return null;
    var down = e.min / at - 1, up = e.max / at - 1;
    return Math.abs(down) > Math.abs(up) ? { value: down, at: e.minAt } : { value: up, at: e.maxAt };
  }

  return { value: value, range: range, extremes: extremes, change: change };
})();
