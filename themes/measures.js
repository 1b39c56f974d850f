// One row of the table of every measure: what a material does over a window,
// over a part of it where its data end sooner, counted from a reference.
"use strict";

var measures = (function () {
  function heads(unit) {
    return ["Material", "over", "ρ, " + unit.s, "slope at reference, ppm/K", "least slope", "greatest slope", "chord, cold", "chord, hot", "box, ppm/K", "greatest change", "at", "change, cold side", "change, hot side", "EMF to copper, µV/K", "density, g/cm³", "service temperature", "status"];
  }

  function measured(m, q) {
    var lo = Math.max(q.lo, m.lo), hi = Math.min(q.hi, m.hi), x = m.ratio && lo < hi ? evaluate.measures(m.ratio, q.reference, lo, hi) : null;
    var rho = m.rho && evaluate.value(m.rho, q.reference), whole = lo <= q.lo + 1e-9 && hi >= q.hi - 1e-9;
    function side(from, to) { return from < to - 1e-9 ? evaluate.change(m.ratio, q.reference, from, to).value : null; }
    return { x: x, rho: rho === undefined ? null : rho, whole: whole, lo: lo, hi: hi, cold: x && side(lo, Math.min(hi, q.reference)), hot: x && side(Math.max(lo, q.reference), hi) };
  }

  function cell(v, print, none) { return v === null || v === undefined || !isFinite(v) ? { text: none, sort: null } : { text: print(v), sort: v }; }

  function row(m, q, unit, link) {
    var d = measured(m, q), x = d.x || {}, none = !m.ratio ? "no coefficient" : evaluate.value(m.ratio, q.reference) === null ? "not told at reference" : "not told";
    function ppm(v) { return cell(v, numbers.ppm, v === null && d.x ? "none" : none); }
    function change(v) { return cell(v, numbers.change, v === null && d.x ? "none" : none); }
    return [link, d.lo > d.hi ? "no part of it" : d.whole ? "the whole window" : preference.temperature(d.lo) + " to " + preference.temperature(d.hi) + " only",
      cell(d.rho, function (v) { return numbers.significant(quantity.fromSI(unit, v), m.digits); }, "not told"), ppm(x.slope), ppm(x.slopes && x.slopes.min), ppm(x.slopes && x.slopes.max), ppm(x.cold), ppm(x.hot), ppm(x.box),
      change(x.change && x.change.value), x.change ? { text: preference.temperature(x.change.at), sort: x.change.at } : { text: "not told", sort: null }, change(d.cold), change(d.hot),
      interval(m.emf, 1e6), interval(m.density, 1e-3), m.service ? { text: preference.temperature(m.service), sort: m.service } : { text: "not stated", sort: null }, m.status];
  }

  function interval(p, factor) {
    if (!p) return { text: "not stated", sort: null };
    function print(x) { return numbers.trimmed(x * factor, 4); }
    if (p[0] !== null) return { text: print(p[0]), sort: p[0] * factor };
    return { text: p[1] === null ? "at most " + print(p[2]) : p[2] === null ? "at least " + print(p[1]) : print(p[1]) + " to " + print(p[2]), sort: (p[2] === null ? p[1] : p[2]) * factor };
  }

  function bandCell(m, q) {
    var h = window.held && held[m.id], b = h && h.ratio_band;
    var w = b && b.corners && evaluate.changeBand(b.corners, q.reference, Math.max(q.lo, m.lo), Math.min(q.hi, m.hi));
    return w ? numbers.change(w.lower) + " to " + numbers.change(w.upper) + (b.not_covered.length ? ", without " + b.not_covered.join(", ") : "") : "no limits stated";
  }

  return { heads: heads, row: row, measured: measured, band: bandCell };
})();
