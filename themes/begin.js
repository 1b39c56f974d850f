// Begins a page: says that there are scripts, before anything is drawn, so
// that what needs them is there at once and nothing moves; then loads the
// scripts of a part when the reader first touches it, so that a page that is
// only read stays small. A part names its scripts in data-scripts.
"use strict";

document.documentElement.className = "scripts";

document.addEventListener("DOMContentLoaded", function () {
  var asked = {}; // names that were asked for, with what waits for them

  function load(names, done) {
    if (names.length === 0) return done();
    var name = names[0], next = function () { load(names.slice(1), done); };
    if (asked[name] === "here") return next();
    if (asked[name]) return asked[name].push(next);
    asked[name] = [next];
    var script = document.createElement("script");
    script.src = name;
    script.onload = function () {
      var waiting = asked[name];
      asked[name] = "here";
      waiting.forEach(function (f) { f(); });
    };
    script.onerror = function () { document.querySelector(".incomplete").style.display = "block"; };
    document.head.appendChild(script);
  }

  document.querySelectorAll("[data-scripts]").forEach(function (part) {
    var touched = false;
    function touch() {
      if (touched) return;
      touched = true;
      load(part.getAttribute("data-scripts").split(" "), function () { part.classList.add("ready"); });
    }
    ["focusin", "pointerover", "input", "toggle"].forEach(function (event) { part.addEventListener(event, touch, true); });
  });
  var read;
  try { read = localStorage.getItem("read-in"); } catch (refused) { read = null; }
  var choice = document.getElementById("read-in");
  if (read && choice) load(choice.getAttribute("data-scripts").split(" "), function () {});
});
