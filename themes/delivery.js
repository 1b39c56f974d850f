// Check a delivery: a reading, corrected to the temperature of the limits, and
// the zone it lies in. The limits are those of the record, or those that the
// order laid down; the rule is chosen before anything is measured. Terms as in
// JCGM 106: a guard band as wide as U lies inside or outside the limits.
"use strict";

(function () {
  var m = asked.m, place = document.getElementById("delivery");
  if (!m || !place) return;
  if (!m.rho || !m.ratio) {
    place.appendChild(parts.make("p", {}, "Cannot be told: correcting a reading needs a resistivity and a coefficient, and this data set lacks one."));
    return;
  }
  var unit = quantity.find("resistivity", preference.resistivityUnit || m.resistivity_unit);
  var recorded = m.rho_band.corners ? evaluate.band(m.rho_band.corners, m.ref) : null;
  var caution = "A verdict is a calculation from recorded values, not an approval; verify by test. Isolate, lock out and discharge before measuring. Local codes, the applicable product standards and licensed practice come first.";
  var told = parts.make("p", { role: "status" }), facts = parts.make("dl", { "class": "facts", "aria-live": "polite" });
  var print = parts.make("button", { type: "button" }, "Print a card to sign");
  place.append(
    parts.make("p", { "class": "sentence" }, parts.field("The lot reads", "lot-reads", "", 13), " ", parts.field("at", "lot-at", preference.temperature(Math.min(Math.max(296.15, m.lo), m.hi)), 9), " ",
      parts.field("with U (k=2) of", "lot-u", "0.3 %", 7), "."),
    parts.make("p", { "class": "sentence" }, parts.field("Limits", "lot-limits", recorded ? limitsText(recorded) : "", 22), " ", parts.field("told at", "lot-told-at", preference.temperature(m.ref), 9), " ",
      parts.choice("rule", "lot-rule", [["plain", "limits as they stand"], ["inside", "accept only what is surely inside"], ["outside", "reject only what is surely outside"]], "plain"), " ", parts.field("lot", "lot-name", "", 10)),
    parts.make("p", { "class": "remark" }, (recorded ? "The limits are those of this record. " : "This record states no limits of ρ: write those of the order. ") + "Agree on the rule before measuring; it is part of the order."),
    told, facts, parts.make("p", {}, caution), parts.make("p", {}, print));

  function limitsText(b) {
    return numbers.trimmed(quantity.fromSI(unit, b.lower), 6).replace("\u2212", "-") + " to " + numbers.trimmed(quantity.fromSI(unit, b.upper), 6) + " " + unit.s;
  }

  function show(x) { return numbers.united(numbers.significant(quantity.fromSI(unit, x), m.digits + 1), unit.s); }

  // zone of a value under a rule: [verdict, why].
  function zone(v, u, limits, rule) {
    var inside = v >= limits[0] && v <= limits[1];
    var surely = v - u >= limits[0] && v + u <= limits[1], out = v + u < limits[0] || v - u > limits[1];
    var why = surely ? "more than U inside the limits" : out ? "more than U outside the limits" : (inside ? "inside" : "outside") + ", but within U of a limit";
    var accept = rule === "inside" ? surely : rule === "outside" ? !out : inside;
    return [accept ? "accept" : "reject", why];
  }

  function judge() {
    var problems = [];
    if (document.getElementById("lot-reads").value.trim() === "") {
      parts.say(told, []);
      told.textContent = "Write the reading, for example 43.6 " + unit.s + ".";
      return parts.facts(facts, []);
    }
    var v = parts.attempt(problems, "lot-reads", function (w) { return quantity.number("resistivity", w, unit.s).value; });
    var t = parts.attempt(problems, "lot-at", function (w) { return asked.inRange(asked.temperature(w)); });
    var u = parts.attempt(problems, "lot-u", function (w) { return quantity.number("ratio", w, "%").value; });
    var limits = parts.attempt(problems, "lot-limits", function (w) {
      if (w.trim() === "") throw "Write the limits of the order, for example 41 to 45 " + unit.s;
      var q = quantity.read("resistivity", w.trim());
      if (!q.limits) throw "Write the limits as a range, for example 41 to 45 " + unit.s;
      return q.limits;
    });
    var at = parts.attempt(problems, "lot-told-at", function (w) { return asked.inRange(asked.temperature(w)); });
    if (u !== null && !(u >= 0)) problems.push("U is not negative.");
    if (v !== null && !(v > 0)) problems.push("A resistivity is more than zero.");
    parts.say(told, problems);
    if (problems.length) return parts.facts(facts, []);
    var corrected = v / evaluate.value(evaluate.rereference(m.ratio, at), t), z = zone(corrected, corrected * u, limits, document.getElementById("lot-rule").value);
    parts.facts(facts, [
      ["Corrected to " + preference.temperature(at), show(corrected), "read " + show(v) + " at " + preference.temperature(t) + ", changed by " + numbers.change(corrected / v - 1)],
      ["With U", show(corrected * (1 - u)) + " to " + show(corrected * (1 + u)), "k=2; the coefficient's own ± is not in it"],
      ["Limits", (isFinite(limits[0]) ? show(limits[0]) : "none") + " to " + (isFinite(limits[1]) ? show(limits[1]) : "none"), "rule: " + document.getElementById("lot-rule").selectedOptions[0].textContent],
      ["Zone", z[0], z[1]]
    ]);
  }

  // The card is the same facts with the record's identity and blanks to sign.
  print.addEventListener("click", function () {
    var old = document.querySelector(".card");
    if (old) old.remove();
    var lot = document.getElementById("lot-name").value;
    document.body.appendChild(parts.make("section", { "class": "card" },
      parts.make("h2", {}, "Check of a delivery: " + m.name), parts.make("p", {}, "Lot: " + (lot || "____________________")),
      parts.make("p", {}, "Record " + m.id + ", revision " + m.revision + ", fingerprint " + m.fingerprint + ", " + m.status + ". " + m.source + "."),
      facts.cloneNode(true),
      parts.make("p", {}, caution),
      parts.make("p", {}, "Measured by ____________________   date ____________   instrument ____________________"),
      parts.make("p", {}, "Checked by ____________________   date ____________   signature ____________________")));
    document.body.classList.add("prints-card");
    window.print();
    document.body.classList.remove("prints-card");
  });

  place.addEventListener("input", judge);
  place.addEventListener("change", judge);
  judge();
})();
