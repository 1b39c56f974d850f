// Prints numbers as the program does: a true minus, a narrow space before the
// unit, as many digits as the source justifies.
"use strict";

var numbers = (function () {
  var narrow = "\u202f";

  // A half of the last place is rounded away from zero.
  function away(x) { return x + x * 3e-16; }

  function fixed(x, decimals) {
    var s = away(x).toFixed(Math.max(0, Math.min(20, decimals)));
    return /^-[0.]*$/.test(s) ? s.slice(1) : s.replace("-", "\u2212");
  }

  // significant prints x with digits; plain between 1e-4 and 1e7, otherwise
  // as 5.0×10⁻⁷.
  function significant(x, digits) {
    if (!isFinite(x)) return "not a number";
    if (x === 0) return "0";
    digits = Math.max(1, Math.min(15, digits));
    var parts = away(x).toExponential(digits - 1).split("e"), e = Number(parts[1]);
    if (e < -4 || e > 6) return parts[0].replace("-", "\u2212") + "×10" + superscript(e);
    var p = Math.pow(10, Math.max(0, e - digits + 1));
    return fixed(p > 1 ? Math.sign(x) * Math.round(Math.abs(x) / p) * p : x, Math.max(0, digits - 1 - e));
  }

  function superscript(n) {
    return String(n).replace("-", "⁻").replace(/\d/g, function (c) { return "⁰¹²³⁴⁵⁶⁷⁸⁹"[c]; });
  }

  function united(text, symbol) { return symbol ? text + narrow + symbol : text; }

  // trimmed prints at most the given decimals, without zeros at the end.
  function trimmed(x, decimals) { return String(Number(x.toFixed(decimals))).replace("-", "\u2212"); }

  // celsius prints kelvin as °C, at most three decimals.
  function celsius(t) { return united(trimmed(t - 273.15, 3), "°C"); }

  function ppm(x) {
    var p = x * 1e6;
    return fixed(p, Math.abs(p) < 99.95 ? 1 : 0);
  }

  // change prints a relative change, in ppm below one per cent.
  function change(x) {
    return Math.abs(x) >= 0.01 ? united(fixed(x * 100, 2), "%") : united(ppm(x), "ppm");
  }

  return { fixed: fixed, significant: significant, united: united, trimmed: trimmed, celsius: celsius, ppm: ppm, change: change };
})();
