// Reads numbers with units as the program does: "50 mV", "0.5 in", "68 °F",
// "-40 to 85 °C", "43 µΩ·cm ± 5 %", "±20 ppm/K". The unit table stands in the
// variable unitTable, which the program writes into the same file. What is not
// understood is thrown as a plain sentence, never guessed.
"use strict";

var quantity = (function () {
  var blank = "[ \\t\\u00a0\\u202f\\u2009]*";
  var numberForm = new RegExp("^([-\\u2212+]?)(\\d+(?:\\.\\d+)?|\\.\\d+)(?:[eE]([-\\u2212+]?\\d+)|" + blank + "(?:×|x(?=[ 1])|\\*)" + blank + "10(?:\\^([-\\d⁰¹²³⁴⁵⁶⁷⁸⁹⁻]+)|([⁰¹²³⁴⁵⁶⁷⁸⁹⁻]+)))?");
  // A unit ends before a ±, a plus, the word to, a comma or a bracket with k.
  var unitForm = /^(?!to )(?:(?!\+|,[ \t]| to | ?\(k ?=|\.\.\.|±|…)[^])*/;
  var signForm = /^(?:±|\+\/[-\u2212]|\+[-\u2212])/;
  var spelled = {};

  // fold brings every spelling of one unit to one.
  function fold(s) {
    var out = "", f = unitTable.folds;
    for (var i = 0; i < s.length;) {
      var k = 0;
      while (k < f.length && s.substr(i, f[k].length) !== f[k]) k += 2;
      out += k < f.length ? f[k + 1] : s[i];
      i += k < f.length ? f[k].length : 1;
    }
    out = out.split("*").join("");
    unitTable.lastFolds.forEach(function (p) { out = out.split(p[0]).join(p[1]); });
    return out;
  }

  // find gives the unit of a kind by any spelling; undefined when it has none.
  function find(kind, text) {
    if (!spelled[kind]) {
      var m = spelled[kind] = Object.create(null);
      unitTable.kinds[kind].forEach(function (u) { u.n.forEach(function (s) { m[s] = u; }); });
    }
    return spelled[kind][text] || spelled[kind][fold(text)];
  }

  function usual(kind) {
    return unitTable.kinds[kind].filter(function (u) { return u.s; }).slice(0, 3).map(function (u) { return u.s; }).join(", ");
  }

  // a kind with its article: "an area".
  function named(kind) { return (/^[aeiou]/.test(kind) ? "an " : "a ") + kind; }

  function toSI(u, x) { return (x + (u.o || 0)) * u.f; }
  function fromSI(u, x) { return x / u.f - (u.o || 0); }

  // A reader walks through one text.
  function Reader(kind, text) { this.kind = kind; this.text = text; this.rest = text; this.skip(); }

  Reader.prototype = {
    skip: function () { this.rest = this.rest.replace(new RegExp("^" + blank), ""); },
    take: function (form) {
      var m = form.exec(this.rest);
      if (!m) return null;
      this.rest = this.rest.slice(m[0].length);
      return m;
    },
    number: function () {
      var m = numberForm.exec(this.rest);
      if (!m) return null;
      var after = this.rest.slice(m[0].length), comma = /^\d+,\d+/.exec(this.rest.replace(/^[-\u2212+]/, ""));
      if (comma || /^,\d/.test(after)) throw "The number in “" + this.text + "” has a comma; write a decimal point";
      this.rest = after;
      var power = (m[3] || m[4] || m[5] || "0").replace("\u2212", "-").replace("⁻", "-").replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹]/g, function (c) { return "⁰¹²³⁴⁵⁶⁷⁸⁹".indexOf(c); });
      var x = Number((m[1] && m[1] !== "+" ? "-" : "") + m[2] + "e" + power);
      if (!isFinite(x)) throw "“" + this.text + "” is too large to be a value";
      this.skip();
      return x;
    },
    need: function () {
      var x = this.number();
      if (x === null) throw "“" + this.text + "” does not begin with a number; write for example 43 " + unitTable.kinds[this.kind][0].s;
      return x;
    },
    // unit reads the unit that stands here; null when none does.
    unit: function () {
      var m = unitForm.exec(this.rest), text = m ? m[0].replace(/[ \t\u00a0\u202f\u2009]+$/, "") : "";
      if (text === "") return null;
      var u = find(this.kind, text);
      if (!u) throw this.unknown(text);
      this.rest = this.rest.slice(m[0].length);
      this.skip();
      return u;
    },
    unknown: function (text) {
      for (var other in unitTable.kinds) {
        if (find(other, text)) return "“" + text + "” is a unit of " + other + "; " + named(this.kind) + " is asked for, in " + usual(this.kind);
      }
      return "“" + text + "” is no unit of " + this.kind + " that is known; write it in " + usual(this.kind);
    },
    bare: function () {
      if (this.kind === "ratio") return find("ratio", "1");
      throw "“" + this.text + "” has no unit; write " + named(this.kind) + " in " + usual(this.kind);
    },
    // magnitude is one number of a ±, with % or a unit, as a difference in SI.
    magnitude: function (value, unit) {
      var x = this.number();
      if (x === null || x < 0) throw "The ± in “" + this.text + "” is not understood; write ± 5 %, or ± 2 with the unit";
      if (this.kind !== "ratio" && this.take(/^%(?! ?[\/I])/)) {
        if (value === null || value === 0 || this.kind === "temperature") throw "A ± in % of “" + this.text + "” says nothing; write it in a unit";
        return Math.abs(value * x / 100);
      }
      var m = /^(?:(?!\+|±|\(k|\/ ?[-\u2212]|,[ \t])[^])*/.exec(this.rest), text = m[0].trim();
      this.rest = this.rest.slice(m[0].length);
      if (text === "") return { bare: x };
      var u = this.kind === "temperature" ? find("temperature difference", text) || find(this.kind, text) : find(this.kind, text);
      if (!u) throw this.unknown(text);
      return x * u.f;
    },
    end: function () {
      this.skip();
      if (this.rest !== "") throw "After the value in “" + this.text + "” stands “" + this.rest + "”, which is not understood";
    }
  };

  function size(m, unit) { return typeof m === "number" ? m : m.bare * unit.f; }

  // read gives {value, unit, limits: [lower, upper] or null}, in SI. A range
  // and a bare ± have limits and no value.
  function read(kind, text) {
    var r = new Reader(kind, text), value = null, limits = null, unit;
    var sided = r.take(/^(?:<=|≤|<|at most |>=|≥|>|at least )/);
    if (sided) {
      r.skip();
      var bound = r.need();
      unit = r.unit() || r.bare();
      limits = /^[<≤]|most/.test(sided[0]) ? [-Infinity, toSI(unit, bound)] : [toSI(unit, bound), Infinity];
    } else if (r.take(signForm)) {
      r.skip();
      var around = r.magnitude(null);
      unit = typeof around === "number" ? unitTable.kinds[kind][0] : r.bare();
      if (!/coefficient|EMF|ratio|difference|voltage/.test(kind)) throw "“" + text + "” has a ± and no value; write the value first";
      limits = [-size(around, unit), size(around, unit)];
    } else {
      var x = r.need();
      unit = r.unit();
      if (r.take(/^(?:to[ \u00a0\u202f]|…|\.\.\.)/)) {
        r.skip();
        var y = r.need(), last = r.unit() || unit || r.bare();
        limits = [toSI(unit || last, x), toSI(last, y)];
        unit = last;
      } else {
        unit = unit || r.bare();
        value = toSI(unit, x);
        if (r.take(signForm)) {
          r.skip();
          var half = size(r.magnitude(value), unit);
          limits = [value - half, value + half];
        }
      }
    }
    r.end();
    if (limits && limits[0] > limits[1]) throw "“" + text + "” begins above its end; write the lower one first";
    [value].concat(limits || []).forEach(function (v) {
      if (kind === "temperature" && v !== null && v < -1e-9 && v !== -Infinity) throw "“" + text + "” lies below absolute zero";
    });
    if (value !== null && !isFinite(value)) throw "“" + text + "” is too large to be a value";
    return { value: value, unit: unit, limits: limits };
  }

  // number reads a text that must have a value; a bare number takes the usual
  // unit, which the page names beside the field.
  function number(kind, text, usualUnit) {
    text = text.trim();
    if (text === "") throw "Write a value, for example 43 " + (usualUnit || unitTable.kinds[kind][0].s);
    if (usualUnit && /^[-\u2212+]?[\d.]+(?:[eE][-+]?\d+)?$/.test(text)) text += " " + usualUnit;
    var q = read(kind, text);
    if (q.value === null) throw "“" + text + "” is a range; one value is asked for";
    return q;
  }

  // window reads two temperatures, or two values of another kind.
  function window(kind, text) {
    var q = read(kind, text.trim());
    if (!q.limits || q.value !== null || !isFinite(q.limits[0]) || !isFinite(q.limits[1])) throw "“" + text + "” is no range; write two values joined by the word to: 0 °C to 100 °C";
    return q.limits;
  }

  // gauge gives the diameter in m of "AWG 24", "24 AWG" or "AWG 4/0", exact by
  // definition; null for anything else.
  function gauge(text) {
    var m = /^\s*(?:AWG\s*(0000|000|00|\d+\/0|\d+)|(0000|000|00|\d+\/0|\d+)\s*AWG)\s*$/i.exec(text);
    if (!m) return null;
    var size = m[1] || m[2], n = /^0{2,4}$/.test(size) ? 1 - size.length : /\/0$/.test(size) ? 1 - parseInt(size, 10) : Number(size);
    return n < -3 || n > 56 ? null : 0.000127 * Math.pow(92, (36 - n) / 39);
  }

  return { gauge: gauge, read: read, number: number, window: window, find: find, fold: fold, toSI: toSI, fromSI: fromSI, units: function (kind) { return unitTable.kinds[kind]; } };
})();
