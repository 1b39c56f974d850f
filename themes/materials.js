// The list of materials: finding by text, family, resistivity and by how
// little a material changes. The data stand in the variable listed, which a
// script beside this one sets.
"use strict";

(function () {
  var form = document.getElementById("finder");
  var told = document.getElementById("told");
  var rows = Array.prototype.slice.call(document.querySelectorAll("#list tbody tr"));
  var byId = {};
  listed.forEach(function (m) { byId[m.id] = m; });

  function field(id) { return document.getElementById(id).value.trim(); }

  var unit = quantity.find("resistivity", form.getAttribute("data-resistivity"));

  function temperature(text) { return quantity.number("temperature", text, preference.temperatureUnit).value; }
  function resistivity(text) { return quantity.number("resistivity", text, unit.s).value; }

  function share(text) {
    var x = quantity.number("ratio", text, "%").value;
    if (x < 0) throw "write the change without a sign";
    return x;
  }

  function question() {
    var q = { text: field("text").toLowerCase(), family: field("family"), drafts: document.getElementById("drafts").checked };
    if (field("rho-from")) q.rhoFrom = resistivity(field("rho-from"));
    if (field("rho-to")) q.rhoTo = resistivity(field("rho-to"));
    if (field("change")) {
      q.change = share(field("change"));
      q.lo = temperature(field("from"));
      q.hi = temperature(field("to"));
      if (q.lo >= q.hi) throw "write the lower temperature first";
    }
    return q;
  }

  // verdict: "shown", "out" (with no word needed) or "untold" when the data do
  // not cover the window.
  function verdict(m, q) {
    if (!q.drafts && m.status !== "released") return "draft";
    if (q.text && m.words.indexOf(q.text) < 0) return "out";
    if (q.family && m.family !== q.family) return "out";
    if (q.rhoFrom !== undefined || q.rhoTo !== undefined) {
      var rho = m.rho && evaluate.value(m.rho, 293.15);
      if (rho === null) return "out";
      if (q.rhoFrom !== undefined && rho < q.rhoFrom) return "out";
      if (q.rhoTo !== undefined && rho > q.rhoTo) return "out";
    }
    if (q.change === undefined) return "shown";
    if (!m.ratio) return "untold";
    var c = evaluate.change(m.ratio, 293.15, q.lo, q.hi);
    if (c === null) return "untold";
    return Math.abs(c.value) <= q.change ? "shown" : "out";
  }

  function plural(n, what) { return n + " " + what + (n === 1 ? "" : "s"); }

  function show() {
    var q, count = { shown: 0, out: 0, untold: 0, draft: 0 };
    told.textContent = "";
    try { q = question(); } catch (problem) {
      var bad = document.createElement("span");
      bad.className = "bad";
      bad.textContent = String(problem) + ". The list below is not narrowed.";
      told.appendChild(bad);
      rows.forEach(function (r) { r.hidden = false; });
      return;
    }
    rows.forEach(function (r) {
      var v = verdict(byId[r.getAttribute("data-id")], q);
      count[v]++;
      r.hidden = v !== "shown";
    });
    var text = plural(count.shown, "material") + " shown";
    if (count.out) text += "; " + count.out + " do not fit";
    if (count.untold) text += "; " + count.untold + " cannot be told, their data do not cover the window or 20 °C";
    if (count.draft) text += "; " + plural(count.draft, "draft") + " or withdrawn left out";
    told.textContent = text + ".";
  }

  form.addEventListener("input", show);
  form.addEventListener("submit", function (e) { e.preventDefault(); });
  show();
})();
