// Shows a page in the units the reader likes: temperatures and resistivities
// in tables and facts are converted from what is printed, to as many digits as
// the printed ones justify. Figures keep the house units, and so does the
// controlled sheet, which does not load this script.
"use strict";

(function () {
  var choice = document.getElementById("read-in");
  var house = choice.getAttribute("data-resistivity");
  var minus = /\u2212/g, n = "[\\u2212-]?\\d+(?:\\.\\d+)?";

  function options(kind, first) {
    return quantity.units(kind).map(function (u) { return [u.s, u.s + (u.s === first ? ", as printed" : "")]; });
  }

  function build() {
    var held = choice.contains(document.activeElement);
    choice.textContent = "";
    choice.append(...parts.choice("Read in", "read-temperature", options("temperature", "°C"), preference.temperatureUnit), " and ",
      ...parts.choice("resistivity in", "read-resistivity", options("resistivity", house), preference.resistivityUnit || house), ", ",
      ...parts.choice("copy with a decimal", "read-mark", [[".", "point"], [",", "comma"]], preference.mark));
    if (held) document.getElementById("read-temperature").focus();
    choice.addEventListener("change", function () {
      function value(id) { return document.getElementById(id).value; }
      var r = value("read-resistivity");
      var kept = preference.keep({ temperature: value("read-temperature"), resistivity: r === house ? "" : r, mark: value("read-mark") });
      if (kept) location.reload(); else choice.append(" This browser keeps nothing for pages opened as files.");
    });
  }

  // converter of printed numbers from one unit to another; differences of
  // places as the program does: the power of ten nearest to one old place.
  function converter(kind, from, to) {
    var a = quantity.find(kind, from), b = quantity.find(kind, to);
    return function (text) {
      var x = Number(text.replace(minus, "-")), decimals = (/\.(\d+)/.exec(text) || ["", ""])[1].length;
      var y = quantity.fromSI(b, quantity.toSI(a, x));
      if (kind === "temperature") return numbers.trimmed(y, Math.max(decimals + (to === "°F" ? 1 : 2), 2));
      var place = Math.round(Math.log10(Math.pow(10, -decimals) * a.f / b.f)), p = Math.pow(10, Math.max(0, place));
      return numbers.fixed(place > 0 && Math.abs(y) >= p ? Math.sign(y) * Math.round(Math.abs(y) / p) * p : y, Math.max(0, -place));
    };
  }

  function escaped(s) { return s.replace(/[.*+?^${}()|[\]\\\/]/g, "\\$&"); }

  function change(kind, from, to) {
    if (!to || from === to) return false;
    var convert = converter(kind, from, to), unit = "[\\u202f ]" + escaped(from) + "(?![\\w²³·/])";
    var withUnit = new RegExp("(" + n + ")(?:( to )(" + n + "))?" + unit, "g"), head = new RegExp("((?: in|,) )" + escaped(from) + "$");
    var bare = new RegExp("^" + n + "$|^" + n + " to " + n + "$"), any = new RegExp(n, "g");
    function inText(node) {
      node.nodeValue = node.nodeValue.replace(withUnit, function (all, x, joint, y) { return convert(x) + (joint ? joint + convert(y) : "") + "\u202f" + to; });
    }
    function cell(c) {
      if (bare.test(c.textContent.trim())) c.textContent = c.textContent.trim().replace(any, convert);
    }
    function texts(root) {
      var walk = document.createTreeWalker(root, NodeFilter.SHOW_TEXT), list = [];
      while (walk.nextNode()) if (!walk.currentNode.parentNode.closest("svg, script, code, option, .label")) list.push(walk.currentNode);
      list.forEach(inText);
    }
    document.querySelectorAll("main table").forEach(function (table) {
      Array.prototype.forEach.call(table.rows, function (row) {
        var cells = Array.prototype.slice.call(row.cells), first = cells[0].textContent.trim();
        if (row.parentNode.tagName === "THEAD") return;
        cells.forEach(function (c, i) {
          var h = table.tHead && table.tHead.rows[0].cells[i];
          if (i > 0 && head.test(first) || h && head.test(h.textContent.trim()) || i > 0 && cells[i + 1] && cells[i + 1].textContent.trim() === from) cell(c);
        });
        cells.forEach(function (c, i) { if (i > 0 && c.textContent.trim() === from) c.textContent = to; });
        if (head.test(first)) cells[0].textContent = first.replace(head, "$1" + to);
      });
      if (table.tHead) Array.prototype.forEach.call(table.tHead.rows[0].cells, function (h) {
        texts(h);
        var w = document.createTreeWalker(h, NodeFilter.SHOW_TEXT);
        while (w.nextNode()) w.currentNode.nodeValue = w.currentNode.nodeValue.replace(head, "$1" + to);
      });
    });
    document.querySelectorAll("main table, main dl, main p, main li, main summary").forEach(function (e) {
      if (!e.closest("#ask, .finder") && !(e.tagName === "P" && e.closest("table, dl, li"))) texts(e);
    });
    return true;
  }

  build();
  var changed = [change("temperature", "°C", preference.temperatureUnit), change("resistivity", house, preference.resistivityUnit)];
  var main = document.getElementById("content");
  if (changed[0] || changed[1]) {
    main.insertBefore(parts.make("p", { "class": "caveat screen-only" }, "Shown in your units, converted from what is printed here: " +
      [changed[0] ? preference.temperatureUnit : null, changed[1] ? preference.resistivityUnit : null].filter(Boolean).join(" and ") +
      ". Figures and the controlled sheet keep the units of the reference."), main.children[1]);
  }
})();
