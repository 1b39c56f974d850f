// First shunt: from a current and a drop to a strip, one row an alloy. It is a
// first size, not a design; what it leaves out stands on the page, and the
// study block that the program runs can be copied from here.
"use strict";

(function () {
  var fields = ["current", "drop", "stock", "length", "window", "ends", "calibrated", "copper"];
  var copperAlpha = 3.93e-3; // 1/K at 20 °C, IEC 60028
  var contact = document.getElementById("shunt").getAttribute("data-contact");
  function part(id) { return document.getElementById("shunt-" + id); }
  function temperature(text) { return quantity.number("temperature", text, preference.temperatureUnit).value; }

  function positive(kind, unit, what) {
    return function (text) {
      var q = quantity.number(kind, text, unit);
      if (!(q.value > 0) || q.limits && !(q.limits[0] > 0)) throw what + " is more than zero";
      return q;
    };
  }

  function question() {
    var problems = [], q = {};
    function ask(name, read) { q[name] = parts.attempt(problems, "shunt-" + name, read); }
    ask("current", positive("current", "A", "A current"));
    ask("drop", positive("voltage", "mV", "A drop"));
    ask("stock", positive("length", "mm", "A thickness"));
    ask("length", positive("length", "mm", "A length"));
    ask("window", function (w) { return quantity.window("temperature", w); });
    ask("ends", temperature);
    ask("calibrated", temperature);
    ask("copper", function (w) {
      if (w.trim() === "") return -1;
      var s = quantity.number("ratio", w, "%").value;
      if (!(s >= 0 && s < 1)) throw "The share of copper lies between 0 and 100 %";
      return s;
    });
    parts.say(part("told"), problems);
    if (problems.length) return null;
    q.r = q.drop.value / q.current.value;
    q.power = q.drop.value * q.current.value;
    return q;
  }

  // joined is the curve of alloy and copper in series, each by its share at
  // the calibration temperature; copper is a straight line, so it is exact.
  function joined(curve, share, t) {
    if (!(share > 0)) return curve;
    var k = copperAlpha / (1 + copperAlpha * (t - 293.15));
    return curve.map(function (s) { return [s[0], s[1], s[2], (1 - share) * s[3] + share * (1 + k * (s[2] - t)), (1 - share) * s[4] + share * k, (1 - share) * s[5], (1 - share) * s[6]]; });
  }

  // size gives the row of one alloy: numbers in SI, and reasons in words.
  function size(m, q) {
    var t = q.calibrated, a = { m: m, reasons: [] }, rho = m.rho && evaluate.value(m.rho, t);
    if (rho === null) {
      a.reasons.push(m.rho ? "ρ is not told at " + preference.temperature(t) : "no resistivity: no width");
      return a;
    }
    a.width = rho * q.length.value / (q.r * q.stock.value);
    a.squares = q.length.value / a.width;
    widths(a, m, q, rho);
    heat(a, m, q, rho);
    changes(a, m, q);
    if (m.emf) {
      a.emf = Math.max.apply(null, m.emf.filter(function (x) { return x !== null; }).map(Math.abs)) / q.drop.value;
      if (a.emf * q.drop.value > 5e-6) a.reasons.push("EMF to copper above 5 µV/K: poor for direct current (common practice)");
    } else a.reasons.push("EMF to copper not stated");
    return a;
  }

  // widths adds the least and greatest width over the limits of ρ and stock.
  function widths(a, m, q, rho) {
    var l = m.rho_limits, s = q.stock.limits || [q.stock.value, q.stock.value];
    var scale = l && m.ref !== null && evaluate.value(m.rho, m.ref);
    if (!l) a.reasons.push("limits of ρ not stated");
    if (!l && !q.stock.limits) return;
    var lo = l ? l[0] / scale : 1, hi = l ? l[1] / scale : 1;
    a.least = a.width * lo * q.stock.value / s[1];
    a.most = a.width * hi * q.stock.value / s[0];
  }

  // heat adds mean and hottest temperature of a strip that only its ends cool:
  // U²/12kρ and U²/8kρ above them.
  function heat(a, m, q, rho) {
    var k = m.conducts && m.conducts[0];
    if (!k) return a.reasons.push("no thermal conductivity: its own heat cannot be told");
    a.mean = q.ends + q.drop.value * q.drop.value / (12 * k * rho);
    a.hottest = q.ends + q.drop.value * q.drop.value / (8 * k * rho);
    if (m.service && a.hottest > m.service) a.reasons.push("hotter than its service temperature, " + preference.temperature(m.service));
  }

  function changes(a, m, q) {
    if (!m.ratio) return a.reasons.push("no coefficient: its change cannot be told");
    var lo = Math.min(q.window[0], q.calibrated), hi = Math.max(q.window[1], q.ends, a.mean || 0), t = q.calibrated;
    if (lo < m.lo - 1e-9 || hi > m.hi + 1e-9) {
      a.reasons.push("told only from " + preference.temperature(m.lo) + " to " + preference.temperature(m.hi));
      lo = Math.max(lo, m.lo);
      hi = Math.min(hi, m.hi);
    }
    if (t < lo - 1e-9 || t > hi + 1e-9 || lo >= hi) return;
    var r = evaluate.rereference(m.ratio, t), c = r && evaluate.change(joined(r, q.copper, t), t, lo, hi);
    if (!c) return;
    a.change = c.value;
    a.over = degrees(lo) + " to " + degrees(hi);
  }

  function mm(x) { return numbers.significant(x * 1e3, 3); }
  function told(v, print, none) { return v === undefined ? { text: none, sort: null } : { text: print(v), sort: v }; }

  function show() {
    var q = question(), answer = part("answer");
    if (!q) return;
    answer.textContent = "";
    parts.facts(part("facts"), [
      ["Resistance between the taps", numbers.united(numbers.significant(q.r * 1e6, 4), "µΩ"), "at " + preference.temperature(q.calibrated)],
      ["Power", numbers.united(numbers.significant(q.power, 3), "W"), "at the full current"],
      ["Copper between the taps", q.copper < 0 ? "unknown" : numbers.united(numbers.trimmed(q.copper * 100, 3), "%"), q.copper < 0 ? "each 1 % adds about +39 ppm/K to what is told below" : "in the change below, +39 ppm/K for each 1 %"]
    ]);
    var drafts = part("drafts").checked, family = part("family").value;
    var rows = listed.filter(function (m) { return (drafts ? m.status !== "withdrawn" : m.status === "released") && (!family || m.family === family); }).map(function (m) { return size(m, q); });
    rows.sort(function (a, b) { return (a.change === undefined) - (b.change === undefined) || Math.abs(a.change) - Math.abs(b.change) || (a.m.id < b.m.id ? -1 : 1); });
    answer.appendChild(parts.table("A strip of " + part("stock").value + " and " + part("length").value + " between the taps, one row an alloy",
      ["Alloy", "width, mm", "least", "most", "squares", "element, mean", "hottest", "greatest change", "over", "EMF error, ppm/K"], rows.map(cells)));
    var table = answer.querySelector("table");
    tables.makeSortable(table);
    tables.addCopy(table);
    answer.appendChild(parts.make("ul", { "class": "plain" }, rows.filter(function (a) { return a.reasons.length > 0; }).map(function (a) {
      return parts.make("li", {}, parts.make("strong", {}, a.m.short), ": " + a.reasons.join("; ") + ".");
    })));
    words(q, rows);
  }

  function cells(a) {
    return [parts.make("a", { href: "material/" + a.m.id + ".html" }, a.m.short + (a.m.status === "released" ? "" : " (" + a.m.status + ", not for use)")),
      told(a.width, mm, "cannot be told"), told(a.least, mm, "not stated"), told(a.most, mm, "not stated"), told(a.squares, function (x) { return numbers.significant(x, 3); }, "none"),
      told(a.mean, degrees, "not told"), told(a.hottest, degrees, "not told"), told(a.change, numbers.change, "not told"), a.over || "",
      told(a.emf === undefined ? undefined : a.emf * 1e6, function (x) { return numbers.significant(x, 2); }, "not told")];
  }

  function degrees(t) { return preference.temperature(Math.round((t - 273.15) * 10) / 10 + 273.15); }

  // words fills the study block and the question to the keeper.
  function words(q, rows) {
    var sized = rows.filter(function (a) { return a.width !== undefined; });
    var block = ["```study: shunt", "title: First shunt, " + clean("current") + ", " + clean("drop"), "materials: [" + sized.map(function (a) { return a.m.id; }).join(", ") + "]",
      "current: " + unitFor("current", "A"), "drop: " + unitFor("drop", "mV"), "thickness: " + unitFor("stock", "mm"), "length: " + unitFor("length", "mm"), "ambient: " + clean("window"), "calibrated_at: " + unitFor("calibrated", preference.temperatureUnit), "ends: " + unitFor("ends", preference.temperatureUnit)];
    if (q.copper >= 0) block.push("copper_share: " + unitFor("copper", "%"));
    part("block").textContent = block.concat("```").join("\n");
    part("question").textContent = ["To " + (contact || "the keeper of the records") + ": which alloy for a shunt of " + numbers.significant(q.r * 1e6, 4) + " µΩ, " + clean("current") + ", " + clean("drop") + ", " + clean("window") + ", ends at " + clean("ends") + "?",
      "By the reference: " + sized.slice(0, 5).map(function (a) { return a.m.short + " (revision " + a.m.revision + ", " + a.m.fingerprint + ") " + mm(a.width) + " mm wide, greatest change " + (a.change === undefined ? "not told" : numbers.change(a.change)); }).join("; ") + ".",
      "Not considered: fault current, drift, the full error budget."].join("\n");
  }

  function clean(name) { return part(name).value.trim().replace(/\u2212/g, "-").replace(/\u202f/g, " ").replace(/[\n\r:#{}\[\]]/g, ""); }
  function unitFor(name, unit) { var t = clean(name); return /^[-+\d.e]+$/.test(t) ? t + " " + unit : t; }

  ["block", "question"].forEach(function (name) {
    part("copy-" + name).addEventListener("click", function () { part("copied").textContent = tables.copy(part(name).textContent) ? "Copied." : "Select the text and copy it."; });
  });
  fields.forEach(function (name) { if (["ends", "calibrated"].indexOf(name) >= 0) part(name).value = preference.temperature(temperature(part(name).value)); });
  document.getElementById("shunt").addEventListener("input", show);
  show();
})();
