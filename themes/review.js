// Marks dates that are past by the reader's clock; the site itself knows no
// today, so that it comes out the same from the same records.
"use strict";

(function () {
  var now = new Date();
  var today = now.getFullYear() + "-" + ("0" + (now.getMonth() + 1)).slice(-2) + "-" + ("0" + now.getDate()).slice(-2);
  document.querySelectorAll("time[datetime]").forEach(function (t) {
    if (t.getAttribute("datetime") < today) {
      t.className = "past";
      t.textContent += " (past)";
    }
  });
})();
