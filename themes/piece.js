// A piece of it: the resistance of a length of wire, strip or foil, and the
// length for a resistance. Sizes hold at the reference temperature; from there
// the resistance goes as that of a fixed body.
"use strict";

(function () {
  var m = asked.m, place = document.getElementById("piece");
  if (!m || !place) return;
  if (!m.rho) {
    place.appendChild(parts.make("p", {}, "Cannot be told: this data set has no resistivity."));
    return;
  }
  var first = m.stock.filter(function (s) { return s.diameter || s.thickness; })[0];
  var size = !first ? "0.5 mm" : first.diameter ? text(first.diameter) : text(first.thickness) + " × " + text(first.width);
  var told = parts.make("p", { role: "status" }), facts = parts.make("dl", { "class": "facts", "aria-live": "polite" });
  place.append(
    parts.make("p", { "class": "sentence" }, parts.field("Wire of a diameter, or strip of thickness × width:", "piece-size", size, 26), " ",
      parts.field("length", "piece-length", "1 m", 9), " ", parts.field("at", "piece-at", preference.temperature(home()), 9), " ", parts.field("or the length for", "piece-r", "", 9)),
    parts.make("p", { "class": "remark" }, "A size is 0.5 mm, 0.5 in, AWG 24, 0.40 mm ± 0.008 mm, or 1 mm × 10 mm; foil is 25 µm × 5 mm."),
    told, facts);

  function home() { return m.ref === null ? m.lo : m.ref; }

  function text(side) {
    var t = numbers.trimmed(side[0] * 1e3, 4) + " mm";
    return side[1] === null || side[2] === null ? t : t + " ± " + numbers.trimmed((side[2] - side[1]) / 2 * 1e3, 4) + " mm";
  }

  // side reads one length as {nominal, lower, upper}.
  function side(written) {
    var d = quantity.gauge(written);
    if (d !== null) return { nominal: d, lower: d, upper: d };
    var q = quantity.number("length", written, "mm");
    if (!(q.value > 0) || (q.limits && !(q.limits[0] > 0))) throw "“" + written + "” is no size: it is not more than zero";
    return { nominal: q.value, lower: q.limits ? q.limits[0] : q.value, upper: q.limits ? q.limits[1] : q.value };
  }

  // section gives the cross-section in m², and whether its limits are known.
  function section(written) {
    var sides = written.split(/\s*[×x*]\s*(?=[\d.])/), a;
    if (sides.length > 2) throw "“" + written + "” has more than two sides";
    var s = sides.map(side);
    var area = s.length === 2 ? function (k) { return s[0][k] * s[1][k]; } : function (k) { return Math.PI / 4 * s[0][k] * s[0][k]; };
    a = { nominal: area("nominal"), lower: area("lower"), upper: area("upper") };
    a.limited = a.lower !== a.upper;
    return a;
  }

  // body gives R·A/L of a fixed body at t, the sizes holding at the reference.
  function body(t) {
    if (!m.ratio) {
      var b0 = asked.band(m.rho, m.rho_band, t);
      return { nominal: evaluate.value(m.rho, t), lower: b0 && b0.lower, upper: b0 && b0.upper };
    }
    var from = home(), v = evaluate.value(m.rho, from), k = evaluate.value(evaluate.rereference(m.ratio, from), t);
    var b = asked.band(m.rho, m.rho_band, from), r = asked.band(m.ratio, m.ratio_band, t, from) || { lower: k, upper: k };
    return { nominal: v * k, lower: b && b.lower * r.lower, upper: b && b.upper * r.upper };
  }

  function ohms(x) {
    var a = Math.abs(x), u = a >= 1e3 ? "kΩ" : a >= 1 ? "Ω" : a >= 1e-3 ? "mΩ" : "µΩ";
    return numbers.united(numbers.significant(quantity.fromSI(quantity.find("resistance", u), x), m.digits), u);
  }

  function metres(x) {
    return x >= 1 ? numbers.united(numbers.significant(x, m.digits), "m") : numbers.united(numbers.significant(x * 1e3, m.digits), "mm");
  }

  function between(a, s, print, of) {
    if (a.lower === null) return s.limited ? "limits of ρ not stated; of the size alone " + print(of(a.nominal, s.upper)) + " to " + print(of(a.nominal, s.lower)) : "limits of ρ not stated";
    return "limits " + print(of(a.lower, s.upper)) + " to " + print(of(a.upper, s.lower)) + (s.limited ? "" : ", the size taken as exact");
  }

  function show() {
    var problems = [];
    var s = parts.attempt(problems, "piece-size", section);
    var t = parts.attempt(problems, "piece-at", function (w) { return asked.inRange(asked.temperature(w)); });
    var l = parts.attempt(problems, "piece-length", function (w) { return quantity.number("length", w, "m").value; });
    var r = parts.attempt(problems, "piece-r", function (w) { return w.trim() === "" ? NaN : quantity.number("resistance", w, "Ω").value; });
    if (l !== null && !(l > 0)) problems.push("A length is more than zero.");
    if (r !== null && r <= 0) problems.push("A resistance is more than zero.");
    parts.say(told, problems);
    if (problems.length) return parts.facts(facts, []);
    var b = body(t), at = " at " + preference.temperature(t);
    parts.facts(facts, [
      ["Resistance" + at, ohms(b.nominal * l / s.nominal), between(b, s, ohms, function (x, area) { return x * l / area; })],
      ["Resistance per length", numbers.united(numbers.significant(b.nominal / s.nominal, m.digits), "Ω/m"), numbers.united(numbers.significant(b.nominal / s.nominal * 304.8, m.digits), "Ω/1000 ft")],
      ["Cross-section", numbers.united(numbers.significant(s.nominal * 1e6, 4), "mm²"), "at " + preference.temperature(home())],
      isNaN(r) ? null : ["Length for " + ohms(r) + at, metres(r * s.nominal / b.nominal), between(b, s, metres, function (x, area) { return r * area / x; }).replace(/limits (.*) to (.*?)(,|$)/, "limits $2 to $1$3")]
    ]);
  }

  place.addEventListener("input", show);
  show();
})();
