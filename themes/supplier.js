// A supplier's figure, such as "±20 ppm/K, box, 20 to 60 °C", and our curve by
// the same measure over the same window.
"use strict";

var supplier = (function () {
  var measureNames = { box: 1, chord: 1, slope: 1, change: 1 };

  // "±20 ppm/K, box, 20 to 60 °C" in any order.
  function figure(text) {
    var f = { lo: null };
    text.split(",").forEach(function (piece) {
      piece = piece.trim();
      if (measureNames[piece.toLowerCase()]) f.measure = piece.toLowerCase();
      else if (/°|\bK$|deg/.test(piece) && /\bto\b|…/.test(piece) && !/\/\s*(K|°|deg)/.test(piece)) { var w = quantity.window("temperature", piece); f.lo = w[0]; f.hi = w[1]; }
      else f.limit = piece;
    });
    if (!f.limit || !f.measure || f.lo === null) throw "Write limit, measure and window: ±20 ppm/K, box, 20 to 60 °C; measures are box, chord, slope and change";
    var kind = f.measure === "change" ? "ratio" : "temperature coefficient", q = quantity.read(kind, f.limit);
    f.limits = q.limits || [-Math.abs(q.value), Math.abs(q.value)];
    return f;
  }

  // our gives the least and greatest of our curve by the measure of f.
  function our(m, f, reference) {
    var x = m.ratio && evaluate.measures(m.ratio, reference, f.lo, f.hi);
    if (!x) return null;
    if (f.measure === "box") return [x.box, x.box];
    if (f.measure === "slope") return [x.slopes.min, x.slopes.max];
    if (f.measure === "change") return [x.change.min, x.change.max];
    var c = [x.cold, x.hot].filter(function (v) { return v !== null; });
    return [Math.min.apply(null, c), Math.max.apply(null, c)];
  }

  // judge says how material m stands to the figure f.
  function judge(m, f, reference) {
    var v = our(m, f, reference), print = f.measure === "change" ? numbers.change : function (x) { return numbers.united(numbers.ppm(x), "ppm/K"); };
    if (v === null) return "cannot be told: the window or " + preference.temperature(reference) + " lies outside its data, or it has no coefficient";
    var inside = v[0] >= f.limits[0] && v[1] <= f.limits[1];
    return f.measure + " " + print(v[0]) + (v[0] === v[1] ? "" : " to " + print(v[1])) + (inside ? ": our curve lies within the figure, on nominal values" : ": our curve lies outside the figure");
  }

  return { figure: figure, judge: judge };
})();
