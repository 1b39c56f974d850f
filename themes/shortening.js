// The shortening sentence: which materials are left, and for each other one
// why it dropped out. Those whose data cover a part of the window only are
// told apart, with what they do over that part.
"use strict";

var shortening = (function () {
  function said(property, what) { return property === undefined ? what + " not stated" : null; }

  // far is the largest magnitude that a property may have.
  function far(p) {
    return Math.max.apply(null, p.filter(function (x) { return x !== null; }).map(Math.abs));
  }

  // verdict gives {kind: "kept" | "part" | "out", why, value} of one material m
  // for the question q. Everything in q is SI, undefined when not asked.
  function verdict(m, q) {
    if (q.released && m.status !== "released") return { kind: "out", why: m.status + ", not for use" };
    if (q.family && m.family !== q.family) return { kind: "out", why: m.family || "family not stated" };
    var why = resistivity(m, q) || emf(m, q) || service(m, q);
    if (why) return { kind: "out", why: why };
    return q.change === undefined ? { kind: "kept", why: "" } : changes(m, q);
  }

  function resistivity(m, q) {
    if (!q.rho) return null;
    var v = m.rho && evaluate.value(m.rho, q.reference);
    if (v === null) return m.rho ? "ρ is not told at " + preference.temperature(q.reference) : "ρ cannot be told";
    return v < q.rho[0] || v > q.rho[1] ? "ρ is " + q.printRho(v, m.digits) : null;
  }

  function emf(m, q) {
    if (q.emf === undefined) return null;
    var missing = said(m.emf, "EMF to copper");
    if (missing) return missing;
    var e = far(m.emf);
    return e > q.emf ? "EMF to copper is up to " + numbers.united(numbers.significant(e * 1e6, 2), "µV/K") : null;
  }

  function service(m, q) {
    if (q.service === undefined) return null;
    if (m.service === undefined || m.service === null) return "service temperature not stated";
    return m.service < q.service - 1e-9 ? "service temperature is " + preference.temperature(m.service) : null;
  }

  function changes(m, q) {
    if (!m.ratio) return { kind: "out", why: "no coefficient: its change cannot be told" };
    if (evaluate.value(m.ratio, q.reference) === null) return { kind: "out", why: "not told at " + preference.temperature(q.reference) + ", from which the change is counted" };
    var lo = Math.max(q.lo, m.lo), hi = Math.min(q.hi, m.hi), whole = lo <= q.lo + 1e-9 && hi >= q.hi - 1e-9;
    if (lo > hi) return { kind: "out", why: "told only from " + preference.temperature(m.lo) + " to " + preference.temperature(m.hi) };
    var c = evaluate.change(m.ratio, q.reference, lo, hi);
    if (c === null) return { kind: "out", why: "its change cannot be told" };
    var does = "changes by " + numbers.change(c.value) + " at " + preference.temperature(c.at);
    if (Math.abs(c.value) > q.change) return { kind: "out", why: does };
    if (!whole) return { kind: "part", why: "told only from " + preference.temperature(lo) + " to " + preference.temperature(hi) + "; there it " + does, value: c.value };
    return { kind: "kept", why: does, value: c.value };
  }

  // apply sorts all materials into {kept, part, out}, each [{m, why}].
  function apply(list, q) {
    var r = { kept: [], part: [], out: [] };
    list.forEach(function (m) {
      var v = verdict(m, q);
      r[v.kind].push({ m: m, why: v.why, value: v.value });
    });
    function least(a, b) { return Math.abs(a.value || 0) - Math.abs(b.value || 0); }
    r.kept.sort(least);
    r.part.sort(least);
    return r;
  }

  return { apply: apply };
})();
