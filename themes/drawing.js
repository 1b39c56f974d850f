// Draws curves into an svg element with the classes, inks and dashes of the
// printed figures. Lengths are tenths of a px, as there. A curve ends where
// its valid range ends.
"use strict";

var drawing = (function () {
  var unit = 10, top = 30, foot = 42, letter = 8.3, digit = 7.2, steps = 160;

  function element(name, attributes, parent, text) {
    var e = document.createElementNS("http://www.w3.org/2000/svg", name);
    for (var a in attributes) e.setAttribute(a, attributes[a]);
    if (text !== undefined) e.textContent = text;
    if (parent) parent.appendChild(e);
    return e;
  }

  // roundStep is the one of 1, 2, 5 times a power of ten nearest by ratio.
  function roundStep(wanted) {
    var p = Math.pow(10, Math.floor(Math.log10(wanted))), m = wanted / p;
    return m < Math.SQRT2 ? p : m < Math.sqrt(10) ? 2 * p : m < Math.sqrt(50) ? 5 * p : 10 * p;
  }

  function axis(lo, hi, about, grow) {
    if (!(hi - lo > 1e-12 * Math.max(Math.abs(lo), Math.abs(hi)))) {
      var d = Math.max(Math.abs(lo) * 0.05, 1e-9);
      lo -= d;
      hi += d;
    }
    var step = roundStep((hi - lo) / about);
    if (grow) { lo = Math.floor(lo / step + 1e-9) * step; hi = Math.ceil(hi / step - 1e-9) * step; }
    var a = { lo: lo, hi: hi, ticks: [], decimals: Math.max(0, -Math.floor(Math.log10(step) + 1e-9)) };
    for (var i = Math.ceil(lo / step - 1e-9); i * step <= hi + step * 1e-9 && a.ticks.length < 50; i++) a.ticks.push(i * step);
    a.text = function (v) { return a.decimals > 6 ? numbers.significant(v, 3) : numbers.fixed(v, a.decimals); };
    a.at = function (v) { return Math.round(a.from + (v - a.lo) / (a.hi - a.lo) * (a.to - a.from)); };
    return a;
  }

  // sample gives [[x, y], …] of read between lo and hi.
  function sample(read, lo, hi) {
    var list = [];
    for (var i = 0; i <= steps; i++) {
      var t = i === steps ? hi : lo + (hi - lo) * i / steps, y = read(t);
      if (y !== null && isFinite(y)) list.push([t, y]);
    }
    return list;
  }

  function path(x, y, points, first) {
    return points.map(function (p, i) { return (i === 0 ? first || "M" : "L") + x.at(p[0]) + " " + y.at(p[1]); }).join("");
  }

  // draw empties svg and draws d: {width, height, lo, hi (in the unit of the x
  // axis), xTitle, yTitle, curves: [{label, ink, dash, lo, hi, read, band}]};
  // read gives y at x, band {lower, upper} or null. It returns the x axis.
  function draw(svg, d) {
    var lines = d.curves.map(function (c) {
      var from = Math.max(c.lo, d.lo), to = Math.min(c.hi, d.hi), told = from <= to;
      return {
        c: c, points: told ? sample(c.read, from, to) : [],
        lower: told && c.band ? sample(function (t) { var b = c.band(t); return b && b.lower; }, from, to) : [],
        upper: told && c.band ? sample(function (t) { var b = c.band(t); return b && b.upper; }, from, to) : []
      };
    }).filter(function (l) { return l.points.length > 0; });
    svg.textContent = "";
    svg.setAttribute("viewBox", "0 0 " + d.width * unit + " " + d.height * unit);
    if (lines.length === 0) return null;
    var ys = [], longest = 0;
    lines.forEach(function (l) {
      l.points.concat(l.lower, l.upper).forEach(function (p) { ys.push(p[1]); });
      longest = Math.max(longest, l.c.label.length);
    });
    var y = axis(Math.min.apply(null, ys), Math.max.apply(null, ys), 5, true), x = axis(d.lo, d.hi, d.width < 500 ? 4 : 8, false);
    var widest = Math.max.apply(null, y.ticks.map(function (t) { return y.text(t).length; }));
    x.from = Math.max(44, 12 + Math.ceil(widest * digit)) * unit;
    x.to = Math.round((d.width - 16 - Math.min(d.width / 3, longest * letter)) * unit);
    y.from = (d.height - foot) * unit;
    y.to = top * unit;
    frame(svg, x, y, d);
    lines.forEach(function (l) {
      if (l.lower.length) element("path", { "class": "area ink-" + l.c.ink, d: path(x, y, l.upper) + path(x, y, l.lower.reverse(), "L") + "z" }, svg);
    });
    lines.slice().reverse().forEach(function (l) { element("path", { "class": "curve ink-" + l.c.ink + " dash-" + l.c.dash, d: path(x, y, l.points) }, svg); });
    labels(svg, lines, x, y);
    return { x: x, y: y };
  }

  function frame(svg, x, y, d) {
    element("path", { "class": "grid", d: y.ticks.map(function (t) { return "M" + x.from + " " + y.at(t) + "H" + x.to; }).join("") }, svg);
    element("path", { "class": "axis", d: "M" + x.from + " " + y.to + "V" + y.from + "H" + x.to + x.ticks.map(function (t) { return "M" + x.at(t) + " " + y.from + "v50"; }).join("") }, svg);
    y.ticks.forEach(function (t) { element("text", { "class": "tick-y", x: x.from - 70, y: y.at(t) + 40 }, svg, y.text(t)); });
    x.ticks.forEach(function (t) { element("text", { "class": "tick-x", x: x.at(t), y: y.from + 180 }, svg, x.text(t)); });
    element("text", { "class": "title-y", x: 40, y: 140 }, svg, d.yTitle);
    element("text", { "class": "title-x", x: x.to, y: d.height * unit - 60 }, svg, d.xTitle);
  }

  // labels stand at the ends of their curves, spread where they would touch.
  function labels(svg, lines, x, y) {
    var list = lines.map(function (l) {
      var p = l.points[l.points.length - 1];
      return { text: l.c.label, ink: l.c.ink, x: x.at(p[0]) + 60, y: y.at(p[1]) };
    }).sort(function (a, b) { return a.x - b.x || a.y - b.y; });
    for (var from = 0, to; from < list.length; from = to) {
      for (to = from + 1; to < list.length && list[to].x === list[from].x; to++) { /* the same end */ }
      spread(list.slice(from, to), y.to, y.from);
    }
    list.forEach(function (l) { element("text", { "class": "label ink-" + l.ink, x: l.x, y: l.y + 40 }, svg, l.text); });
  }

  function spread(list, top, foot) {
    var gap = 15 * unit, i;
    for (i = 0; i < list.length; i++) list[i].y = Math.max(list[i].y, i > 0 ? list[i - 1].y + gap : top);
    for (i = list.length - 1; i >= 0; i--) list[i].y = Math.min(list[i].y, i < list.length - 1 ? list[i + 1].y - gap : foot);
  }

  return { draw: draw, element: element };
})();
