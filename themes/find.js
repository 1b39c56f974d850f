// Finds materials, guides, reports, decisions, sources and words by text. The
// index stands in the variable indexed: [kind, title, path, words, state].
// Every word asked for must be there; the beginning of a word counts more than
// its middle, the title more than the rest. When nothing fits, words that
// differ by one letter are taken.
"use strict";

(function () {
  var form = document.getElementById("find"), input = document.getElementById("find-text"), list = document.getElementById("find-results"), told = document.getElementById("find-told");
  var root = form.getAttribute("data-root"), most = 12;

  // plain folds case, accents and the two µ and Ω; hyphens part words.
  function plain(s) {
    return s.toLowerCase().normalize("NFKD").replace(/[\u0300-\u036f]/g, "").replace(/\u03c9/g, "ohm").replace(/[^a-z0-9.%\u0370-\u03ff]+/g, " ").trim();
  }

  var entries = indexed.map(function (e) { return { kind: e[0], title: e[1], path: e[2], state: e[4], head: " " + plain(e[1]), body: " " + plain(e[1] + " " + e[3]) }; });

  // near tells whether a and b differ by one letter put in, left out, changed
  // or swapped with its neighbour.
  function near(a, b) {
    if (Math.abs(a.length - b.length) > 1 || a === b) return a === b;
    var i = 0, j = 0;
    while (i < a.length && a[i] === b[i]) i++;
    while (j < a.length - i && j < b.length - i && a[a.length - 1 - j] === b[b.length - 1 - j]) j++;
    var x = a.slice(i, a.length - j), y = b.slice(i, b.length - j);
    return x.length <= 1 && y.length <= 1 || x.length === 2 && x[0] === y[1] && x[1] === y[0];
  }

  function score(e, words, loosely) {
    var sum = 0;
    for (var i = 0; i < words.length; i++) {
      var w = words[i];
      if (e.head.indexOf(" " + w) >= 0) sum += 8;
      else if (e.body.indexOf(" " + w) >= 0) sum += 4;
      else if (w.length > 1 && e.body.indexOf(w) >= 0) sum += 2;
      else if (loosely && w.length > 3 && e.body.split(" ").some(function (b) { return near(w, b); })) sum += 1;
      else return 0;
    }
    return sum + (e.kind === "material" ? 1 : 0);
  }

  function search(words, loosely) {
    return entries.map(function (e, i) { return { e: e, s: score(e, words, loosely), i: i }; }).filter(function (r) { return r.s > 0; })
      .sort(function (a, b) { return b.s - a.s || a.i - b.i; });
  }

  function show() {
    var text = plain(input.value), words = text === "" ? [] : text.split(" ");
    list.textContent = "";
    told.textContent = "";
    if (words.length === 0) return;
    var found = search(words, false), loosely = found.length === 0;
    if (loosely) found = search(words, true);
    found.slice(0, most).forEach(function (r) {
      var li = document.createElement("li"), a = document.createElement("a"), kind = document.createElement("span");
      a.href = root + r.e.path;
      a.textContent = r.e.title;
      kind.className = "remark";
      kind.textContent = " " + r.e.kind + (r.e.state ? ", " + r.e.state : "");
      li.append(a, kind);
      list.appendChild(li);
    });
    told.textContent = found.length === 0 ? "Nothing is found; try fewer letters, an element or a designation."
      : (loosely ? "Nothing has exactly that; nearly: " : "") + (found.length > most ? most + " of " + found.length + "." : found.length + " found.");
  }

  function move(step) {
    var links = Array.prototype.slice.call(list.querySelectorAll("a")), at = links.indexOf(document.activeElement) + step;
    if (at < 0) input.focus(); else if (links[at]) links[at].focus();
  }

  form.addEventListener("keydown", function (e) {
    if (e.key === "ArrowDown" || e.key === "ArrowUp") { move(e.key === "ArrowDown" ? 1 : -1); e.preventDefault(); }
    if (e.key === "Escape") { input.value = ""; show(); input.focus(); }
  });
  form.addEventListener("submit", function (e) {
    e.preventDefault();
    var first = list.querySelector("a");
    if (first) first.click();
  });
  input.addEventListener("input", show);
  show();
})();
