// Copies that leave the page: a table as CSV with the reader's decimal mark, and
// the figure with its looks written into it. What the numbers rest on goes
// along.
"use strict";

var copies = (function () {
  function save(name, type, text) {
    var a = parts.make("a", { href: URL.createObjectURL(new Blob([text], { type: type })), download: name });
    a.click();
    setTimeout(function () { URL.revokeObjectURL(a.href); }, 1000);
  }

  function csv(table, evidence) {
    var sep = preference.mark === "," ? ";" : ",";
    return Array.prototype.map.call(table.rows, function (r) {
      return Array.prototype.map.call(r.cells, function (c) {
        var t = preference.marked(c.textContent.trim());
        return /[",;\n]/.test(t) ? '"' + t.replace(/"/g, '""') + '"' : t;
      }).join(sep);
    }).concat(evidence.map(function (e) { return '"' + e.replace(/"/g, '""') + '"'; })).join("\r\n") + "\r\n";
  }

  // picture is the figure with its looks written into it, so that it can stand
  // outside this page.
  function picture(svg, evidence) {
    var copy = svg.cloneNode(true), from = svg.querySelectorAll("*"), to = copy.querySelectorAll("*");
    for (var i = 0; i < from.length; i++) {
      var s = getComputedStyle(from[i]), look = ["fill", "stroke", "stroke-width", "stroke-dasharray", "font-family", "font-size", "font-weight", "text-anchor", "opacity", "paint-order"];
      look.forEach(function (p) { to[i].setAttribute(p, s.getPropertyValue(p)); });
    }
    copy.querySelectorAll(".crosshair").forEach(function (g) { g.remove(); });
    copy.setAttribute("xmlns", "http://www.w3.org/2000/svg");
    copy.prepend(drawing.element("desc", {}, null, evidence.join("; ")));
    return new XMLSerializer().serializeToString(copy);
  }

  return { save: save, csv: csv, picture: picture };
})();
