// Side by side: the page that joins the shortening sentence, the bench with
// its figure and readings, the table of measures and the supplier's line. The
// data stand in listed; bands come with held[id], loaded when they are wanted.
"use strict";

(function () {
  var byId = Object.create(null), formerly = Object.create(null), bench = [], seen = null, cursor = null, axes = null, timer = 0, after = 0, narrow = false;
  listed.forEach(function (m) { byId[m.id] = m; (m.formerly || []).forEach(function (old) { formerly[old] = m; }); });
  function part(id) { return document.getElementById(id); }
  var fields = { from: "window-from", to: "window-to", ref: "window-ref", show: "window-show", at: "read-at-text", less: "keep-less", rho: "keep-rho", emf: "keep-emf", service: "keep-service", family: "keep-family", supplier: "supplier" };
  var ticks = { all: "keep-all", bands: "window-bands" };
  var house = part("bench").getAttribute("data-resistivity"), unit = quantity.find("resistivity", preference.resistivityUnit || house);
  var degrees = quantity.find("temperature", preference.temperatureUnit), contact = part("bench").getAttribute("data-contact");

  function temperature(text) { return quantity.number("temperature", text, preference.temperatureUnit).value; }
  function asked(text, read) { return text.trim() === "" ? undefined : read(text.trim()); }
  function printRho(v, digits) { return numbers.united(numbers.significant(quantity.fromSI(unit, v), digits), unit.s); }
  function share(text) {
    var v = quantity.number("ratio", text, "%").value;
    if (v < 0) throw "Write the change without a sign";
    return v;
  }

  // question reads every field; problems are told, and null is given.
  function question() {
    var problems = [], q = { printRho: printRho };
    q.lo = parts.attempt(problems, fields.from, temperature);
    q.hi = parts.attempt(problems, fields.to, temperature);
    q.reference = parts.attempt(problems, fields.ref, temperature);
    q.change = parts.attempt(problems, fields.less, function (w) { return asked(w, share); });
    q.rho = parts.attempt(problems, fields.rho, function (w) {
      return asked(w, function (w) {
        var r = quantity.read("resistivity", /[a-zµμΩΩ]\S*$/i.test(w.replace(/\bto\b/g, "")) ? w : w + " " + unit.s);
        if (!r.limits) throw "Write the resistivity as a range, for example 40 to 50 " + unit.s;
        return r.limits;
      });
    });
    q.emf = parts.attempt(problems, fields.emf, function (w) { return asked(w, function (w) { return Math.abs(quantity.number("thermal EMF", w.replace(/^±\s*/, ""), "µV/K").value); }); });
    q.service = parts.attempt(problems, fields.service, function (w) { return asked(w, temperature); });
    q.family = part(fields.family).value;
    q.released = !part(ticks.all).checked;
    if (problems.length === 0 && !(q.hi - q.lo > 1e-9)) problems.push("The window ends before it begins; write the lower temperature first.");
    parts.say(part("window-told"), problems);
    return problems.length ? null : q;
  }

  function link(m) { return parts.make("a", { href: "material/" + m.id + ".html" }, m.short); }

  // --- the shortening sentence ---

  function names(list, id, before) {
    var p = part(id);
    p.textContent = "";
    if (list.length === 0) return;
    p.append(before + " ");
    list.slice(0, 12).forEach(function (r, i) { p.append(i ? ", " : "", link(r.m), " ", parts.make("span", { "class": "remark" }, r.why)); });
    p.append(list.length > 12 ? ", and " + (list.length - 12) + " more." : ".");
  }

  function shorten(q) {
    var r = shortening.apply(listed, q);
    seen = r;
    names(r.kept, "kept", r.kept.length + " of " + listed.length + " kept:");
    if (r.kept.length === 0) { part("kept").textContent = "None of " + listed.length + " is kept over the whole window."; }
    names(r.part, "partly", "Over part of the window only:");
    part("dropped-count").textContent = "Why " + r.out.length + " dropped out";
    clearTimeout(timer);
    if (part("dropped").open) timer = setTimeout(reasons, 150);
  }

  function reasons() {
    var place = part("dropped-list");
    place.textContent = "";
    if (seen.out.length) place.appendChild(parts.table("Materials that dropped out", ["Material", "because"], seen.out.map(function (r) { return [link(r.m), r.why]; })));
  }

  // --- the bench ---

  function put(id) {
    if (!byId[id] || bench.indexOf(id) >= 0) return;
    bench.push(id);
    if (bench.length > 16) bench.shift();
  }

  function remove(id) { bench = bench.filter(function (b) { return b !== id; }); }

  // reader gives y at t (K) of material m in the shown quantity, null outside.
  function reader(m, q, show) {
    if (show === "rho") return m.rho && function (t) { var v = evaluate.value(m.rho, t); return v === null ? null : quantity.fromSI(unit, v); };
    var r = m.ratio && evaluate.rereference(m.ratio, q.reference);
    return r && function (t) { var v = evaluate.value(r, t); return v === null ? null : show === "ratio" ? v : v - 1; };
  }

  function bander(m, q, show) {
    var h = window.held && held[m.id];
    if (!part(ticks.bands).checked || !h) return null;
    var b = show === "rho" ? h.rho_band : h.ratio_band;
    if (!b.corners) return null;
    return function (t) {
      var w = show === "rho" ? evaluate.band(b.corners, t) : evaluate.band(b.corners, t, q.reference);
      if (!w) return null;
      var f = show === "rho" ? function (x) { return quantity.fromSI(unit, x); } : show === "ratio" ? function (x) { return x; } : function (x) { return x - 1; };
      return { lower: f(w.lower), upper: f(w.upper) };
    };
  }

  function printed(y, show, m) {
    return show === "rho" ? numbers.united(numbers.significant(y, m.digits), unit.s) : show === "ratio" ? numbers.fixed(y, m.decimals) : numbers.change(y);
  }

  function draw(q) {
    var show = part(fields.show).value, svg = part("drawing");
    var used = bench.map(function (id, i) {
      var m = byId[id];
      return { m: m, ink: i % 4 + 1, dash: (i + Math.floor(i / 4)) % 4 + 1, read: reader(m, q, show), band: bander(m, q, show) };
    });
    var greatest = 0, scale = 1, title = show === "rho" ? "ρ in " + unit.s : "R/R at " + preference.temperature(q.reference);
    if (show === "change") {
      used.forEach(function (u) {
        var c = u.m.ratio && u.read && evaluate.change(u.m.ratio, q.reference, Math.max(q.lo, u.m.lo), Math.min(q.hi, u.m.hi));
        if (c) greatest = Math.max(greatest, Math.abs(c.value));
      });
      scale = greatest < 0.01 ? 1e6 : 100;
      title = "change in " + (scale === 100 ? "%" : "ppm") + " from " + preference.temperature(q.reference);
    }
    function x(t) { return quantity.fromSI(degrees, t); }
    function back(v) { return quantity.toSI(degrees, v); }
    axes = drawing.draw(svg, {
      width: narrow ? 380 : 760, height: narrow ? 320 : 400, lo: x(q.lo), hi: x(q.hi), xTitle: "temperature in " + degrees.s, yTitle: title,
      curves: used.filter(function (u) { return u.read; }).map(function (u) {
        return { label: u.m.short, ink: u.ink, dash: u.dash, lo: x(u.m.lo), hi: x(u.m.hi), read: function (v) { var y = u.read(back(v)); return y === null ? null : y * scale; },
          band: u.band && function (v) { var b = u.band(back(v)); return b && { lower: b.lower * scale, upper: b.upper * scale }; } };
      })
    });
    svg.setAttribute("aria-label", "Curves of " + used.map(function (u) { return u.m.short; }).join(", ") + ". The table below holds their measures.");
    svg.style.display = axes ? "" : "none";
    part("bench-empty").hidden = bench.length > 0;
    readings(used, q, show, scale, x);
  }

  // readings lists the chosen materials with their inks; the crosshair writes
  // each value there, and the same row takes a material off the bench.
  function readings(used, q, show, scale, x) {
    var list = part("readings"), cells = [];
    list.textContent = "";
    used.forEach(function (u) {
      var sample = drawing.element("svg", { "class": "figure sample", viewBox: "0 0 300 100", "aria-hidden": "true" });
      drawing.element("path", { "class": "curve ink-" + u.ink + " dash-" + u.dash, d: "M0 50H300" }, sample);
      var value = parts.make("span", { "class": "value" }), off = parts.make("button", { type: "button", "class": "copy", "aria-label": "take off " + u.m.short }, "take off");
      off.addEventListener("click", function () { remove(u.m.id); update(); });
      list.appendChild(parts.make("li", {}, sample, " ", link(u.m), " ", value, " ", parts.make("span", { "class": "remark" }, standing(u.m)), " ", off));
      cells.push(value);
    });
    var group = axes && drawing.element("g", { "class": "crosshair", "aria-hidden": "true" }, part("drawing")), line, dots;
    if (group) {
      line = drawing.element("path", { "class": "axis" }, group);
      dots = used.map(function (u) { return drawing.element("circle", { r: 45, "class": "dot ink-" + u.ink }, group); });
    }
    cursor = function (t) {
      if (line) line.setAttribute("d", "M" + axes.x.at(x(t)) + " " + axes.y.to + "V" + axes.y.from);
      used.forEach(function (u, i) {
        var y = u.read && u.read(t);
        cells[i].textContent = y === null || y === undefined || y === false ? (u.read ? "not told there" : show === "rho" ? "ρ cannot be told" : "no coefficient") : printed(y, show, u.m);
        if (!dots) return;
        dots[i].setAttribute("visibility", typeof y === "number" ? "visible" : "hidden");
        if (typeof y === "number") { dots[i].setAttribute("cx", axes.x.at(x(t))); dots[i].setAttribute("cy", axes.y.at(y * scale)); }
      });
    };
    var slider = part("read-at");
    slider.min = Math.ceil(x(q.lo) * 10) / 10;
    slider.max = Math.floor(x(q.hi) * 10) / 10;
    slider.hidden = !axes;
    if (axes) { // it lies under the axis that it moves along; 8 px are half of its knob
      var wide = part("drawing").viewBox.baseVal.width / 100;
      slider.style.marginLeft = "calc(" + axes.x.from / wide + "% - 8px)";
      slider.style.width = "calc(" + (axes.x.to - axes.x.from) / wide + "% + 16px)";
    }
    readAt(q);
  }

  function standing(m) {
    var told = m.lo === null ? "no data" : "told " + preference.temperature(m.lo) + " to " + preference.temperature(m.hi);
    return told + (m.status === "released" ? "" : ", " + m.status + ", not for use") + (m.invented ? ", invented" : "");
  }

  // readAt moves the crosshair to the temperature in the field.
  function readAt(q) {
    var problems = [], t = parts.attempt(problems, fields.at, temperature);
    parts.say(part("read-told"), problems);
    if (t === null || !cursor) return;
    part("read-at").value = quantity.fromSI(degrees, t);
    cursor(q ? Math.min(Math.max(t, q.lo), q.hi) : t);
  }

  function readNow() {
    var q = question();
    readAt(q);
    if (q) remember(q);
  }

  // --- the table of every measure ---

  function table(q) {
    var place = part("measures");
    place.textContent = "";
    if (bench.length === 0) return;
    var list = bench.map(function (id) { return byId[id]; }), h = measures.heads(unit), rows = list.map(function (m) { return measures.row(m, q, unit, link(m)); });
    if (part(ticks.bands).checked) {
      h.push("band of the change");
      rows.forEach(function (r, i) { r.push(measures.band(list[i], q)); });
    }
    place.appendChild(parts.table("Every measure from " + preference.temperature(q.lo) + " to " + preference.temperature(q.hi) + ", counted from " + preference.temperature(q.reference), h, rows));
    var table = place.querySelector("table");
    tables.makeSortable(table);
    tables.addCopy(table);
    missing(list);
  }

  // missing says what is not stated, and who can be asked.
  function missing(list) {
    var gaps = [["emf", "EMF to copper"], ["density", "density"], ["service", "service temperature"], ["conducts", "thermal conductivity"]].map(function (g) {
      var of = list.filter(function (m) { return m[g[0]] === undefined || m[g[0]] === null; }).map(function (m) { return m.short; });
      return of.length ? g[1] + " of " + of.join(", ") : null;
    }).filter(Boolean);
    part("measures").appendChild(parts.make("p", { "class": "remark" }, gaps.length ? "Not stated: " + gaps.join("; ") + "." + (contact ? " If you need one of these, ask " + contact + "." : "") : "None of the properties compared is missing."));
  }

  // --- a supplier's figure ---

  function hold(q) {
    var problems = [], place = part("supplier-answer");
    place.textContent = "";
    var f = parts.attempt(problems, fields.supplier, function (w) { return asked(w, supplier.figure); });
    parts.say(part("supplier-told"), problems);
    if (f) bench.forEach(function (id) { place.appendChild(parts.make("li", {}, link(byId[id]), ": " + supplier.judge(byId[id], f, q.reference) + ".")); });
  }

  // --- address, copies ---

  function state() {
    var s = {};
    for (var k in fields) s[k] = part(fields[k]).value;
    for (var t in ticks) s[t] = part(ticks[t]).checked ? "yes" : "";
    return s;
  }

  function chosen(q) {
    return bench.map(function (id) {
      var m = byId[id], d = measures.measured(m, q);
      return { id: id, revision: m.revision, fingerprint: m.fingerprint, rho: d.rho, change: d.x ? d.x.change.value : null };
    });
  }

  function remember(q) {
    var hash = address.write(state(), chosen(q));
    try { history.replaceState(null, "", hash); } catch (refused) { /* some browsers refuse it for files; the field has the link */ }
    part("link").value = part("link-printed").textContent = location.href.split("#")[0] + hash;
  }

  // recall sets fields and bench from an address and tells what has changed.
  function recall() {
    var a = address.read(location.hash), told = [];
    for (var k in fields) if (a.state[k] !== undefined) part(fields[k]).value = a.state[k];
    for (var t in ticks) if (location.hash.length > 1) part(ticks[t]).checked = a.state[t] === "yes";
    if (part(fields.show).selectedIndex < 0) part(fields.show).value = "change";
    if (part(fields.family).selectedIndex < 0) part(fields.family).value = "";
    if (a.chosen.length) bench = [];
    a.chosen.forEach(function (c) {
      var m = byId[c.id] || formerly[c.id];
      if (!m) return told.push("“" + c.id + "” is no material of this reference; it may have been removed.");
      if (m.id !== c.id) told.push("“" + c.id + "” is now called " + m.id + ".");
      if (m.status === "withdrawn") told.push(m.short + " is withdrawn" + (m.withdrawn_reason ? ": " + m.withdrawn_reason : "") + (m.replaced_by && byId[m.replaced_by] ? "; replaced by " + byId[m.replaced_by].short : "") + ".");
      put(m.id);
      if (c.fingerprint && c.fingerprint !== m.fingerprint) told.push(changed(c, m));
    });
    part("link-told").textContent = told.join(" ");
  }

  // changed says which values of an old link are others now.
  function changed(c, m) {
    var q = question(), text = m.short + " has changed since this link was made: revision " + c.revision + " then, " + m.revision + " now";
    if (!q) return text + ".";
    var d = measures.measured(m, q), change = d.x ? d.x.change.value : null, same = true;
    function differs(was, now) { return was !== null && (now === null || address.short(now) !== address.short(was)); }
    if (differs(c.rho, d.rho)) { same = false; text += "; ρ was " + printRho(c.rho, 5) + ", is " + (d.rho === null ? "not told" : printRho(d.rho, 5)); }
    if (differs(c.change, change)) { same = false; text += "; the greatest change was " + numbers.change(c.change) + ", is " + (change === null ? "not told" : numbers.change(change)); }
    return text + (same ? "; ρ and change over this window are as they were." : ".");
  }

  // evidence names what the numbers rest on.
  function evidence() {
    return bench.map(function (id) { var m = byId[id]; return m.name + ": " + m.id + ", revision " + m.revision + ", " + m.fingerprint + ", " + m.status; });
  }

  // --- joining ---

  // bands loads what is missing, then draws again.
  function loadBands() {
    if (!part(ticks.bands).checked) return;
    bench.forEach(function (id) {
      if (window.held && held[id] || document.getElementById("held-" + id)) return;
      var s = parts.make("script", { id: "held-" + id, src: "data/" + id + ".js" });
      s.onload = update;
      document.head.appendChild(s);
    });
  }

  function update() {
    var q = question();
    if (!q) return;
    shorten(q);
    loadBands();
    draw(q);
    clearTimeout(after);
    after = setTimeout(function () { table(q); hold(q); }, 0); // the figure first
    part("evidence").textContent = bench.length ? "Rests on " + evidence().join("; ") + "." : "";
    tick();
    remember(q);
  }

  function tick() {
    document.querySelectorAll("#beside tbody input").forEach(function (t) { t.checked = bench.indexOf(t.value) >= 0; });
  }

  function addTicks() {
    Array.prototype.forEach.call(document.querySelector("#beside tbody").rows, function (r) {
      var id = r.getAttribute("data-id"), tick = parts.make("input", { type: "checkbox", value: id, "aria-label": "put " + byId[id].short + " on the bench" });
      r.cells[0].prepend(tick, " ");
    });
    part("beside").addEventListener("change", function (e) {
      if (e.target.checked) put(e.target.value); else remove(e.target.value);
      update();
    });
  }

  // The names to choose from are made when the field is first entered, the
  // ticks when the list is near: a thousand of each would hold up the figure.
  function addNames() {
    part("add").addEventListener("focus", function () { listed.forEach(function (m) { part("names").appendChild(parts.make("option", { value: m.short === m.name ? m.name : m.short + ", " + m.id })); }); }, { once: true });
    part("add").addEventListener("change", function () {
      var text = part("add").value.trim().toLowerCase();
      var found = listed.filter(function (m) { return [m.id, m.name.toLowerCase(), m.short.toLowerCase(), (m.short + ", " + m.id).toLowerCase()].indexOf(text) >= 0; });
      if (found.length === 0) found = listed.filter(function (m) { return text && m.words.indexOf(text) >= 0; });
      part("add-told").textContent = text === "" || found.length === 1 ? "" : found.length === 0 ? "No material is called “" + part("add").value + "”." : found.length + " materials fit; write more of the name.";
      if (found.length !== 1) return;
      put(found[0].id);
      part("add").value = "";
      update();
    });
  }

  // look asks for the width once, and not while the page is being changed.
  function look() { narrow = part("drawing").parentNode.clientWidth <= 560; }

  function listen() {
    var frame = 0;
    function soon() { cancelAnimationFrame(frame); frame = requestAnimationFrame(update); }
    part("question").addEventListener("input", soon);
    part("supplier").addEventListener("input", soon);
    part("dropped").addEventListener("toggle", function () { if (part("dropped").open) reasons(); });
    part("read-at").addEventListener("input", function () { part(fields.at).value = numbers.united(numbers.trimmed(Number(part("read-at").value), 1), degrees.s); readNow(); });
    part(fields.at).addEventListener("input", readNow);
    part("drawing").addEventListener("pointermove", function (e) {
      if (!axes) return;
      var box = part("drawing").getBoundingClientRect(), view = part("drawing").viewBox.baseVal, a = axes.x;
      var v = a.lo + ((e.clientX - box.left) / box.width * view.width - a.from) / (a.to - a.from) * (a.hi - a.lo);
      cursor(quantity.toSI(degrees, Math.round(Math.min(Math.max(v, a.lo), a.hi) * 10) / 10));
    });
    part("drawing").addEventListener("pointerleave", function () { readAt(question()); });
    part("put-kept").addEventListener("click", function () { seen.kept.concat(seen.part).slice(0, 16).forEach(function (r) { put(r.m.id); }); update(); });
    part("clear").addEventListener("click", function () { bench = []; update(); });
    part("save-csv").addEventListener("click", function () { if (bench.length) copies.save("side-by-side.csv", "text/csv", copies.csv(part("measures").querySelector("table"), evidence())); });
    part("save-svg").addEventListener("click", function () { if (axes) copies.save("side-by-side.svg", "image/svg+xml", copies.picture(part("drawing"), evidence())); });
    part("copy-link").addEventListener("click", function () { part("link-told").textContent = tables.copy(part("link").value) ? "The link is copied." : "Copy the link from the field."; });
    part("print").addEventListener("click", function () { window.print(); });
    window.addEventListener("hashchange", function () { recall(); update(); });
    window.addEventListener("resize", function () { look(); soon(); });
  }

  // The first bench, when no address says otherwise: what the sentence keeps.
  function begin() {
    [fields.from, fields.to, fields.ref, fields.at].forEach(function (id) { part(id).value = preference.temperature(temperature(part(id).value.replace("−", "-"))); });
    recall();
    var q = question();
    if (q && bench.length === 0) {
      var r = shortening.apply(listed, q);
      r.kept.concat(r.part).slice(0, 6).forEach(function (x) { put(x.m.id); });
    }
    update();
  }

  new IntersectionObserver(function (seen, observer) {
    if (!seen.some(function (e) { return e.isIntersecting; })) return;
    observer.disconnect();
    addTicks();
    tick();
  }, { rootMargin: "600px" }).observe(part("beside"));
  look();
  addNames();
  listen();
  begin();
})();
