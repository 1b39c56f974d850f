// Value at a temperature: what a material's page answers when it is asked.
// The numbers come from the same segments as the printed ones; the record's
// data stand in held[id], which data/ID.js sets.
"use strict";

// asked gathers what the parts of a material page share.
var asked = (function () {
  var section = document.getElementById("ask"), id = section.getAttribute("data-id"), m = held[id];

  // temperature reads a field; a bare number is in the reader's unit.
  function temperature(text) { return quantity.number("temperature", text, preference.temperatureUnit).value; }

  // inRange throws the refusal of this reference.
  function inRange(t) {
    if (m.lo === null || t < m.lo - 1e-9 || t > m.hi + 1e-9) {
      throw preference.temperature(t) + " lies outside the valid range " + preference.temperature(m.lo) + " to " + preference.temperature(m.hi) + "; no value is given there";
    }
    return t;
  }

  // band of a quantity at t: {lower, upper, words}, null when none is stated.
  function band(curve, b, t, reference) {
    var w = evaluate.band(b.corners, t, reference);
    if (w) return { lower: w.lower, upper: w.upper, covers: b.covers, missing: b.not_covered };
    if (!b.expanded || (reference !== undefined && Math.abs(reference - m.ref) > 1e-9)) return null;
    var v = evaluate.value(curve, t), u = evaluate.value(b.expanded, t);
    return u === null ? null : { lower: v - u, upper: v + u, k: b.k, covers: b.covers, missing: b.not_covered };
  }

  // between prints a band with one digit more than its value.
  function between(b, print, none) {
    if (!b) return none;
    return (b.k ? print(b.lower) + " to " + print(b.upper) + " (k=" + b.k + ")" : "limits " + print(b.lower) + " to " + print(b.upper)) + (b.missing.length ? "; not in it: " + b.missing.join(", ") : "");
  }

  return { section: section, m: m, temperature: temperature, inRange: inRange, band: band, between: between, listeners: [] };
})();

(function () {
  var m = asked.m, place = document.getElementById("ask-value"), at = document.getElementById("ask-at");
  if (!m) return;
  if (section_stale()) return;

  // A page and its data may come from two publications.
  function section_stale() {
    if (asked.section.getAttribute("data-fingerprint") === m.fingerprint) return false;
    place.appendChild(parts.make("p", { "class": "bad" }, "This page and its data come from two publications; load the page again."));
    return true;
  }

  var reference = m.ref === null ? null : preference.temperature(m.ref);
  var units = quantity.units("resistivity").map(function (u) { return [u.s, u.s]; });
  var sentence = at.parentNode;
  if (m.rho) sentence.append(" ", ...parts.choice("ρ in", "ask-unit", units, preference.resistivityUnit || m.resistivity_unit));
  if (m.ratio) sentence.append(" ", ...parts.field("counted from", "ask-from", reference, 9));
  var facts = parts.make("dl", { "class": "facts", "aria-live": "polite" }), told = parts.make("p", { role: "status" });
  place.append(told, facts);
  var body, bodyFacts, bodyTold;
  if (m.ratio) {
    bodyFacts = parts.make("dl", { "class": "facts", "aria-live": "polite" });
    bodyTold = parts.make("p", { role: "status" });
    body = parts.make("p", { "class": "sentence" }, parts.field("A body of", "body-r", "1 Ω"), " ", parts.field("at", "body-t", reference, 9), " ", parts.field("and reading", "body-reads", "", 9));
    place.append(body, bodyTold, bodyFacts, parts.make("p", {}, "A temperature read from a resistance is never the only means of a protective function. Isolate, lock out and discharge before measuring."));
  }

  function field(name) { return document.getElementById(name); }

  function valueRows(t) {
    var rows = [];
    if (m.rho) {
      var u = quantity.find("resistivity", field("ask-unit").value);
      var print = function (x, more) { return numbers.united(numbers.significant(quantity.fromSI(u, x), m.digits + (more || 0)), u.s); };
      var v = evaluate.value(m.rho, t);
      rows.push(["Resistivity at " + preference.temperature(t), print(v), asked.between(asked.band(m.rho, m.rho_band, t), function (x) { return print(x, 1); }, "limits not stated")]);
      rows.push(["Conductivity", numbers.united(numbers.significant(1e-6 / v, m.digits), "MS/m"),
        Math.abs(t - 293.15) < 1e-9 ? numbers.united(numbers.significant(100 / v / 58e6, m.digits), "%IACS") : "%IACS is told at 20 °C only"]);
    } else {
      rows.push(["Resistivity", "cannot be told", "the data set answers ratios only"]);
    }
    return rows;
  }

  function ratioRows(t, from) {
    var r = evaluate.rereference(m.ratio, from), v = evaluate.value(r, t);
    var b = asked.band(r, m.ratio_band, t, from), print = function (x) { return numbers.fixed(x, m.decimals + 1); };
    return [
      ["R over R at " + preference.temperature(from), numbers.fixed(v, m.decimals), asked.between(b, print, "no band is stated for it")],
      ["Change", numbers.change(v - 1), b ? "band " + numbers.change(b.lower - 1) + " to " + numbers.change(b.upper - 1) : ""],
      ["Slope there", numbers.united(numbers.ppm(evaluate.slope(r, t) / v), "ppm/K"), m.table ? "limited by the spacing of the table" : ""]
    ];
  }

  function show() {
    var problems = [], from = null;
    var t = parts.attempt(problems, "ask-at", function (text) { return asked.inRange(asked.temperature(text)); });
    if (m.ratio) from = parts.attempt(problems, "ask-from", function (text) { return asked.inRange(asked.temperature(text)); });
    parts.say(told, problems);
    var rows = t === null ? [] : valueRows(t);
    if (t !== null && from !== null) rows = rows.concat(ratioRows(t, from));
    if (t !== null && !m.ratio) rows.push(["Change with temperature", "cannot be told", "no coefficient"]);
    parts.facts(facts, rows);
    asked.listeners.forEach(function (f) { f(t); });
    if (m.ratio) showBody(t);
  }

  // The resistance of a body at the temperature asked for, and the temperature
  // of a resistance back.
  function showBody(t) {
    var problems = [], rows = [];
    var r = parts.attempt(problems, "body-r", function (text) { return quantity.number("resistance", text, "Ω"); });
    var at = parts.attempt(problems, "body-t", function (text) { return asked.inRange(asked.temperature(text)); });
    var reads = parts.attempt(problems, "body-reads", function (text) { return text.trim() === "" ? { value: NaN } : quantity.number("resistance", text, r ? r.unit.s : "Ω"); });
    if (r && !(r.value > 0)) problems.push("A resistance is more than zero.");
    parts.say(bodyTold, problems);
    if (problems.length === 0) {
      var curve = evaluate.rereference(m.ratio, at);
      var print = function (x) { return numbers.united(numbers.significant(quantity.fromSI(r.unit, x), m.decimals + 1), r.unit.s); };
      if (t !== null) rows.push(["That body at " + preference.temperature(t), print(r.value * evaluate.value(curve, t)), ""]);
      if (isFinite(reads.value)) rows.push(back(curve, r, reads.value, print));
    }
    parts.facts(bodyFacts, rows);
  }

  function back(curve, r, reading, print) {
    var list = evaluate.inverse(curve, reading / r.value), label = "Where it reads " + print(reading), u = quantity.find("temperature", preference.temperatureUnit);
    if (list.length === 0) return [label, "nowhere in the valid range", "no value is given outside it"];
    return [label, list.map(function (t) { return numbers.united(numbers.trimmed(quantity.fromSI(u, t), 2), u.s); }).join(" or "),
      list.length > 1 ? "the curve turns between, so the reading alone cannot tell which" : "the average over the body; hot spots are hotter"];
  }

  asked.section.addEventListener("input", show);
  show();
})();
