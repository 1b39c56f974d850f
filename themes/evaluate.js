// The evaluator: it knows segments only, as the program lowers every curve to
// them. A segment is [from, to, centre, c0, c1, c2, c3] in kelvin, and its
// value is c0 + c1·u + c2·u² + c3·u³ with u = T − centre. A curve is a list of
// segments that adjoin; the lower one owns a shared edge. Every function gives
// null where the curve tells nothing: there is no extrapolation here. The same
// formulas stand in generator/curve, and a test holds both against each other.
"use strict";

var evaluate = (function () {
  var slack = 1e-9; // of the closed range, in kelvin
  var narrow = 1e-7; // K; a narrower stretch has no direction of its own
  var level = 1e-13; // relative change over a segment that counts as none

  function valueIn(s, t) {
    var u = t - s[2];
    return s[3] + u * (s[4] + u * (s[5] + u * s[6]));
  }

  function slopeIn(s, t) {
    var u = t - s[2];
    return s[4] + u * (2 * s[5] + u * 3 * s[6]);
  }

  // [lowest, highest] temperature that the curve tells.
  function range(curve) {
    return [curve[0][0], curve[curve.length - 1][1]];
  }

  // t put back into the closed range when it misses it by no more than the
  // slack; null outside.
  function inside(curve, t) {
    if (!curve || curve.length === 0) return null;
    var r = range(curve);
    if (!(t >= r[0] - slack && t <= r[1] + slack)) return null;
    return Math.min(Math.max(t, r[0]), r[1]);
  }

  // index of the first segment that ends at or above t, which is inside.
  function index(curve, t) {
    var lo = 0, hi = curve.length - 1;
    while (lo < hi) {
      var mid = (lo + hi) >> 1;
      if (curve[mid][1] < t) lo = mid + 1; else hi = mid;
    }
    return lo;
  }

  function at(curve, t, read) {
    t = inside(curve, t);
    return t === null ? null : read(curve[index(curve, t)], t);
  }

  function value(curve, t) { return at(curve, t, valueIn); }
  function slope(curve, t) { return at(curve, t, slopeIn); }

  // Roots of a + b·x + c·x², ascending, where the parabola changes sign; the
  // form that loses no digits.
  function quadratic(a, b, c) {
    if (c === 0) return b === 0 ? [] : [-a / b];
    var d = b * b - 4 * a * c;
    if (!(d > 0)) return [];
    var q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(d)) / 2;
    var list = [q / c, a / q];
    return list.sort(function (x, y) { return x - y; });
  }

  // Temperatures, ascending, where the slope of a segment changes sign.
  function turns(s) {
    return quadratic(s[4], 2 * s[5], 3 * s[6]).map(function (u) { return s[2] + u; });
  }

  // Sign changes of a polynomial p[0] + p[1]·x + … between lo and hi: each lies
  // between two roots of the derivative, where bisection cannot miss it.
  function crossings(p, lo, hi) {
    var n = p.length - 1;
    while (n > 0 && p[n] === 0) n--;
    if (n === 0) return [];
    var derivative = [], edges = [lo], found = [];
    for (var k = 1; k <= n; k++) derivative.push(k * p[k]);
    edges = edges.concat(n > 1 ? crossings(derivative, lo, hi) : [], hi);
    for (var i = 1; i < edges.length; i++) {
      var x = bisect(p, edges[i - 1], edges[i]);
      if (x !== null) found.push(x);
    }
    return found;
  }

  function poly(p, x) {
    for (var v = 0, k = p.length - 1; k >= 0; k--) v = v * x + p[k];
    return v;
  }

  function bisect(p, a, b) {
    var rising = poly(p, b) > poly(p, a);
    if (poly(p, a) > 0 === poly(p, b) > 0) return null;
    for (var i = 0; i < 200; i++) {
      var mid = a + (b - a) / 2;
      if (mid === a || mid === b) break;
      if (poly(p, mid) > 0 === rising) b = mid; else a = mid;
    }
    return a + (b - a) / 2;
  }

  // Calls visit(segment, from, to) for each piece of the curve in the window;
  // false when the window is inverted or reaches outside.
  function over(curve, lo, hi, visit) {
    lo = inside(curve, lo);
    hi = inside(curve, hi);
    if (lo === null || hi === null || lo > hi) return false;
    for (var i = index(curve, lo); i < curve.length; i++) {
      visit(curve[i], Math.max(curve[i][0], lo), Math.min(curve[i][1], hi));
      if (curve[i][1] >= hi) break;
    }
    return true;
  }

  function nothing() { return { min: Infinity, minAt: NaN, max: -Infinity, maxAt: NaN }; }

  function widen(e, t, v) {
    if (v < e.min) { e.min = v; e.minAt = t; }
    if (v > e.max) { e.max = v; e.maxAt = t; }
  }

  // Exact extremes over [lo, hi]: at an edge, at a knot, or where the slope, a
  // parabola, is zero.
  function extremes(curve, lo, hi) {
    var e = nothing();
    var told = over(curve, lo, hi, function (s, from, to) {
      widen(e, from, valueIn(s, from));
      turns(s).forEach(function (t) { if (t > from && t < to) widen(e, t, valueIn(s, t)); });
      widen(e, to, valueIn(s, to));
    });
    return told ? e : null;
  }

  // Extremes of the slope over the value, (1/R)·dR/dT: at an edge or where
  // P″P − P′² is zero, a polynomial of the fourth power.
  function slopeExtremes(curve, lo, hi) {
    var e = nothing();
    var told = over(curve, lo, hi, function (s, from, to) {
      if (!(from < to)) return;
      var c0 = s[3], c1 = s[4], c2 = s[5], c3 = s[6];
      function take(t) { widen(e, t, slopeIn(s, t) / valueIn(s, t)); }
      var p = [2 * c0 * c2 - c1 * c1, 6 * c0 * c3 - 2 * c1 * c2, -2 * c2 * c2, -4 * c2 * c3, -3 * c3 * c3];
      take(from);
      crossings(p, from - s[2], to - s[2]).forEach(function (u) { take(Math.min(Math.max(s[2] + u, from), to)); });
      take(to);
    });
    return told ? e : null;
  }

  // Change over [lo, hi] counted from the value at the reference: the smallest,
  // the greatest, and "value", the signed one of largest magnitude.
  function change(curve, reference, lo, hi) {
    var r = value(curve, reference), e = extremes(curve, lo, hi);
    if (r === null || r === 0 || e === null) return null;
    var c = { min: (e.min - r) / r, minAt: e.minAt, max: (e.max - r) / r, maxAt: e.maxAt };
    var down = Math.abs(c.min) > Math.abs(c.max);
    c.value = down ? c.min : c.max;
    c.at = down ? c.minAt : c.maxAt;
    return c;
  }

  // The mean coefficient from the reference to t; null at the reference itself.
  function chord(curve, reference, t) {
    var r = value(curve, reference), v = value(curve, t);
    if (!r || v === null || Math.abs(t - reference) <= slack) return null;
    return (v - r) / (r * (t - reference));
  }

  // The whole spread over [lo, hi], over R at the reference and the width.
  function box(curve, reference, lo, hi) {
    var r = value(curve, reference), e = extremes(curve, lo, hi);
    return !r || e === null || hi - lo <= slack ? null : (e.max - e.min) / (r * (hi - lo));
  }

  // Turning points of the whole curve, kinks at knots included; a flat stretch
  // turns at its middle.
  function turningPoints(curve) {
    var found = [], last = null;
    curve.forEach(function (s) {
      var edges = [s[0]].concat(turns(s).filter(function (t) { return t > s[0] && t < s[1]; }), s[1]);
      for (var k = 1; k < edges.length; k++) {
        var d = direction(s, edges[k - 1], edges[k]);
        if (d === 0) continue;
        if (last && last.d === -d) found.push({ at: (last.to + edges[k - 1]) / 2, maximum: d < 0 });
        last = { d: d, to: edges[k] };
      }
    });
    return found;
  }

  function direction(s, a, b) {
    if (b - a < narrow) return 0;
    var d = slopeIn(s, (a + b) / 2);
    if (Math.abs(d) * (s[1] - s[0]) <= level * Math.max(Math.abs(valueIn(s, s[0])), Math.abs(valueIn(s, s[1])))) return 0;
    return d > 0 ? 1 : -1;
  }

  // Every measure over a window; null when the window or the reference lies
  // outside, or the resistance is not positive there.
  function measures(curve, reference, lo, hi) {
    var r = value(curve, reference), e = extremes(curve, lo, hi);
    if (!(r > 0) || e === null || !(e.min > 0) || hi - lo <= slack) return null;
    return {
      slope: slope(curve, reference) / r, slopes: slopeExtremes(curve, lo, hi),
      cold: lo < reference - slack ? chord(curve, reference, lo) : null,
      hot: hi > reference + slack ? chord(curve, reference, hi) : null,
      box: (e.max - e.min) / (r * (hi - lo)), change: change(curve, reference, lo, hi)
    };
  }

  // The curve over its value at t, which becomes its new reference.
  function rereference(curve, t) {
    var r = value(curve, t);
    if (!r) return null;
    return curve.map(function (s) { return [s[0], s[1], s[2], s[3] / r, s[4] / r, s[5] / r, s[6] / r]; });
  }

  // Constants told about t: value, α, β, γ. They describe the segment that
  // owns t; for a polynomial that is the whole curve.
  function constants(curve, t) {
    return at(curve, t, function (s, t) {
      var u = t - s[2], v = valueIn(s, t);
      return [v, slopeIn(s, t) / v, (s[5] + 3 * s[6] * u) / v, s[6] / v];
    });
  }

  // All temperatures, ascending, at which the curve has the value v.
  function inverse(curve, v) {
    var found = [];
    curve.forEach(function (s) {
      var lo = s[0] - s[2], hi = s[1] - s[2], p = [s[3] - v, s[4], s[5], s[6]];
      var list = crossings(p, lo, hi);
      [lo, hi].forEach(function (u) { if (Math.abs(poly(p, u)) <= 1e-12 * Math.abs(v)) list.push(u); });
      list.forEach(function (u) { found.push(s[2] + u); });
    });
    found.sort(function (x, y) { return x - y; });
    return found.filter(function (t, i) { return i === 0 || t - found[i - 1] > 1e-6; });
  }

  // Worst case over the corners of the limits: {lower, upper} of read(corner).
  function worst(corners, read) {
    var b = { lower: Infinity, upper: -Infinity };
    for (var i = 0; corners && i < corners.length; i++) {
      var v = read(corners[i]);
      if (v === null) return null;
      b.lower = Math.min(b.lower, v);
      b.upper = Math.max(b.upper, v);
    }
    return corners && corners.length ? b : null;
  }

  // The band at t; with a reference each corner counts from itself, so that
  // limits of ρ alone make no band of a ratio.
  function band(corners, t, reference) {
    return worst(corners, function (c) {
      var v = value(c, t);
      if (reference === undefined || v === null) return v;
      var r = value(c, reference);
      return r ? v / r : null;
    });
  }

  // The band of the change over a window.
  function changeBand(corners, reference, lo, hi) {
    var least = worst(corners, function (c) { var x = change(c, reference, lo, hi); return x && x.min; });
    var most = worst(corners, function (c) { var x = change(c, reference, lo, hi); return x && x.max; });
    return least && most ? { lower: least.lower, upper: most.upper } : null;
  }

  return {
    value: value, slope: slope, range: range, extremes: extremes, slopeExtremes: slopeExtremes, change: change, chord: chord, box: box,
    turningPoints: turningPoints, measures: measures, rereference: rereference, constants: constants, inverse: inverse, band: band, changeBand: changeBand
  };
})();
