// Tables: a click on a column's head sorts, a button copies a table as text
// with tabs. Without scripts every table is complete and in its own order.
"use strict";

(function () {
  // A cell's value for sorting: data-value when it is there, the number it
  // begins with, or its text.
  function value(row, column) {
    var cell = row.cells[column];
    if (!cell) return "";
    if (cell.hasAttribute("data-value")) {
      var v = cell.getAttribute("data-value");
      return v === "" ? null : parseFloat(v);
    }
    var text = cell.textContent.trim();
    var number = parseFloat(text.replace("\u2212", "-"));
    return isNaN(number) ? text.toLowerCase() : number;
  }

  function compare(a, b) {
    if (a === null || b === null) return a === b ? 0 : a === null ? 1 : -1;
    if (typeof a === typeof b) return a < b ? -1 : a > b ? 1 : 0;
    return typeof a === "number" ? -1 : 1;
  }

  function sortBy(table, column, head) {
    var down = head.getAttribute("aria-sort") === "ascending";
    Array.prototype.forEach.call(table.tHead.rows[0].cells, function (h) { h.removeAttribute("aria-sort"); });
    head.setAttribute("aria-sort", down ? "descending" : "ascending");
    var rows = Array.prototype.slice.call(table.tBodies[0].rows);
    rows.sort(function (x, y) {
      var a = value(x, column), b = value(y, column);
      if (a === null || b === null) return compare(a, b); // unknown stays last
      return down ? compare(b, a) : compare(a, b);
    });
    rows.forEach(function (r) { table.tBodies[0].appendChild(r); });
  }

  function makeSortable(table) {
    Array.prototype.forEach.call(table.tHead.rows[0].cells, function (head, column) {
      var button = document.createElement("button");
      button.type = "button";
      while (head.firstChild) button.appendChild(head.firstChild);
      head.appendChild(button);
      button.addEventListener("click", function () { sortBy(table, column, head); });
    });
  }

  // The reader's decimal mark; see preference.js, which writes it.
  var comma = false;
  try { comma = JSON.parse(localStorage.getItem("read-in")).mark === ","; } catch (none) { comma = false; }

  function cellText(c) {
    var text = c.textContent.trim().replace(/\s+/g, " ").replace(/\u2212(?=\d)/g, "-");
    return comma ? text.replace(/(\d)\.(?=\d)/g, "$1,") : text;
  }

  function asText(table) {
    return Array.prototype.map.call(table.rows, function (row) {
      return Array.prototype.map.call(row.cells, cellText).join("\t");
    }).join("\n");
  }

  // Pages opened as files may not use the clipboard directly: select the text
  // and let the browser copy it.
  function copy(text) {
    var area = document.createElement("textarea");
    area.value = text;
    document.body.appendChild(area);
    area.select();
    var done = document.execCommand("copy");
    area.remove();
    return done;
  }

  function addCopy(table) {
    var button = document.createElement("button");
    button.type = "button";
    button.className = "copy";
    button.textContent = "copy table";
    button.addEventListener("click", function () {
      button.textContent = copy(asText(table)) ? "copied" : "cannot copy here";
    });
    (table.closest(".scroll") || table).insertAdjacentElement("afterend", button);
  }

  window.tables = { makeSortable: makeSortable, addCopy: addCopy, asText: asText, copy: copy };
  document.querySelectorAll("table.sortable").forEach(makeSortable);
  document.querySelectorAll("table:not(.sheet)").forEach(addCopy);
})();
