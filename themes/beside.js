// Side by side: tick rows, then show the ticked ones only.
"use strict";

(function () {
  var body = document.querySelector("#beside tbody"), told = document.getElementById("told");
  document.getElementById("chooser").hidden = false;
  Array.prototype.forEach.call(body.rows, function (row) {
    var tick = document.createElement("input");
    tick.type = "checkbox";
    tick.setAttribute("aria-label", "choose " + row.cells[0].textContent.trim());
    row.cells[0].insertBefore(tick, row.cells[0].firstChild);
    row.cells[0].insertBefore(document.createTextNode(" "), tick.nextSibling);
  });
  function show(only) {
    var n = 0;
    Array.prototype.forEach.call(body.rows, function (row) {
      row.hidden = only && !row.querySelector("input").checked;
      if (!row.hidden) n++;
    });
    told.textContent = only && n === 0 ? "Nothing is ticked." : n + " shown.";
  }
  document.getElementById("only").addEventListener("click", function () { show(true); });
  document.getElementById("all").addEventListener("click", function () { show(false); });
})();
