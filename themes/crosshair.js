// A crosshair on the figures of a material page: it reads the adopted curve at
// the pointer, or at the temperature that is asked for. Where the curve ends
// it says so. The field "Value at" does the same by keyboard.
"use strict";

(function () {
  var m = asked.m, svgName = "http://www.w3.org/2000/svg";
  if (!m) return;

  function draw(name, attributes, parent) {
    var e = document.createElementNS(svgName, name);
    for (var a in attributes) e.setAttribute(a, attributes[a]);
    parent.appendChild(e);
    return e;
  }

  // follow gives one figure its crosshair; read(t) is {value, text} or null.
  function follow(svg, read) {
    var s = svg.getAttribute("data-scale").split(" ").map(Number); // xlo xhi from to ylo yhi from to
    var group = draw("g", { "class": "crosshair", "aria-hidden": "true" }, svg);
    var line = draw("path", { "class": "axis" }, group), dot = draw("circle", { r: 45, "class": "dot" }, group);
    var text = draw("text", { "class": "reading" }, group);
    group.setAttribute("visibility", "hidden");

    function show(t) {
      var x = t === null ? NaN : s[2] + (t - 273.15 - s[0]) / (s[1] - s[0]) * (s[3] - s[2]);
      var r = t === null ? null : read(t);
      group.setAttribute("visibility", r ? "visible" : "hidden");
      if (!r) return;
      var y = s[6] + (r.value - s[4]) / (s[5] - s[4]) * (s[7] - s[6]);
      line.setAttribute("d", "M" + x + " " + s[7] + "V" + s[6]);
      dot.setAttribute("cx", x);
      dot.setAttribute("cy", y);
      var left = x > (s[2] + s[3]) / 2;
      text.setAttribute("x", x + (left ? -80 : 80));
      text.setAttribute("y", s[7] + 130);
      text.setAttribute("text-anchor", left ? "end" : "start");
      text.textContent = r.text;
    }

    svg.addEventListener("pointermove", function (e) {
      var box = svg.getBoundingClientRect(), view = svg.viewBox.baseVal;
      var x = (e.clientX - box.left) / box.width * view.width;
      var c = s[0] + (x - s[2]) / (s[3] - s[2]) * (s[1] - s[0]);
      show(Math.round(c * 10) / 10 + 273.15);
    });
    svg.addEventListener("pointerleave", function () { show(resting); });
    asked.listeners.push(show);
  }

  var resting = null;
  asked.listeners.push(function (t) { resting = t; });
  var house = quantity.find("resistivity", m.resistivity_unit);

  document.querySelectorAll("#curves-part svg[data-scale]").forEach(function (svg) {
    var rho = (svg.getAttribute("aria-labelledby") || "").indexOf("rho-") === 0;
    follow(svg, function (t) {
      if (t < m.lo - 1e-9 || t > m.hi + 1e-9) return null;
      var v = evaluate.value(rho ? m.rho : m.ratio, t);
      if (v === null) return null;
      var value = rho ? quantity.fromSI(house, v) : v;
      return { value: value, text: preference.temperature(t) + "  " + (rho ? numbers.united(numbers.significant(value, m.digits), house.s) : numbers.fixed(value, m.decimals)) };
    });
  });
  asked.section.dispatchEvent(new Event("input"));
})();
