// The state of side by side in the address, after the #: what is asked, and
// each chosen material with its revision, fingerprint and two of its numbers,
// so that an old link can say what has changed since. Whatever else stands in
// an address is left unread.
"use strict";

var address = (function () {
  var texts = ["from", "to", "ref", "show", "at", "less", "rho", "emf", "service", "family", "all", "supplier", "bands"];
  var longest = 80;

  // rounded to what a link needs to tell that a value has changed.
  function short(x) { return x === null || !isFinite(x) ? "" : Number(x.toPrecision(5)).toString(); }

  function write(state, chosen) {
    var list = texts.filter(function (k) { return state[k]; }).map(function (k) { return k + "=" + encodeURIComponent(state[k]); });
    if (chosen.length) {
      list.push("materials=" + chosen.map(function (c) { return [c.id, c.revision, c.fingerprint, short(c.rho), short(c.change)].join("~"); }).join(","));
    }
    return "#" + list.join("&");
  }

  // read gives {state, chosen: [{id, revision, fingerprint, rho, change}]}.
  function read(hash) {
    var state = {}, chosen = [];
    hash.replace(/^#/, "").slice(0, 8000).split("&").forEach(function (pair) {
      var i = pair.indexOf("="), key = pair.slice(0, i), value;
      try { value = decodeURIComponent(pair.slice(i + 1)); } catch (broken) { return; }
      if (texts.indexOf(key) >= 0 && value.length <= longest) state[key] = value;
      if (key === "materials") {
        value.split(",").slice(0, 24).forEach(function (text) {
          var m = /^([a-z0-9][a-z0-9-]{0,80})(?:~(\d{1,6})~([0-9a-f-]{0,40})~([-+.e\d]{0,24})~([-+.e\d]{0,24}))?$/.exec(text);
          if (m) chosen.push({ id: m[1], revision: m[2] && Number(m[2]), fingerprint: m[3], rho: m[4] ? Number(m[4]) : null, change: m[5] ? Number(m[5]) : null });
        });
      }
    });
    return { state: state, chosen: chosen };
  }

  return { read: read, write: write, short: short };
})();
