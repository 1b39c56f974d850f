// Small parts of a page, made without markup: every text is set as text.
"use strict";

var parts = (function () {
  // make("p", {class: "remark"}, "text", child, …)
  function make(tag, attributes) {
    var e = document.createElement(tag);
    for (var name in attributes || {}) e.setAttribute(name, attributes[name]);
    for (var i = 2; i < arguments.length; i++) add(e, arguments[i]);
    return e;
  }

  function add(e, child) {
    if (Array.isArray(child)) child.forEach(function (c) { add(e, c); });
    else if (child !== null && child !== undefined) e.appendChild(typeof child === "string" ? document.createTextNode(child) : child);
  }

  // field is a label with its input: [label, input], to stand in a sentence.
  function field(label, id, value, size) {
    return [make("label", { "for": id }, label), " ", make("input", { id: id, value: value, size: size || 8, autocomplete: "off", spellcheck: "false" })];
  }

  function choice(label, id, options, chosen) {
    var select = make("select", { id: id }, options.map(function (o) {
      var option = make("option", { value: o[0] }, o[1]);
      if (o[0] === chosen) option.selected = true;
      return option;
    }));
    return [make("label", { "for": id }, label), " ", select];
  }

  // facts fills a list of label and value, and remark where there is one.
  function facts(list, rows) {
    list.textContent = "";
    rows.forEach(function (r) {
      if (!r) return;
      list.appendChild(make("div", {}, make("dt", {}, r[0]), make("dd", {}, make("span", { "class": "value" }, r[1]), r[2] ? " " : null, r[2] ? make("span", { "class": "remark" }, r[2]) : null)));
    });
  }

  // table makes a table from heads and rows of texts, elements, or
  // {text, sort}; columns that sort by numbers stand on the right.
  function table(caption, heads, rows) {
    var numeric = heads.map(function (h, i) { return i > 0 && rows.some(function (r) { return r[i] && r[i].sort !== undefined; }); });
    return make("div", { "class": "scroll", tabindex: 0, role: "region", "aria-label": caption }, make("table", { "class": "sortable" }, make("caption", {}, caption),
      make("thead", {}, make("tr", {}, heads.map(function (h, i) { return make("th", { scope: "col", "class": numeric[i] ? "n" : "" }, h); }))),
      make("tbody", {}, rows.map(function (r) {
        return make("tr", {}, r.map(function (c, i) {
          var cell = i === 0 ? make("th", { scope: "row", "class": "short" }, c) : make("td", { "class": numeric[i] ? "n" : cellText(c).length > 40 ? "w" : "short" }, c && c.text !== undefined ? c.text : c);
          if (c && c.sort !== undefined) cell.setAttribute("data-value", c.sort === null ? "" : c.sort);
          return cell;
        }));
      }))));
  }

  function cellText(c) { return !c ? "" : typeof c === "string" ? c : c.text !== undefined ? c.text : c.textContent || ""; }

  // attempt runs read and shows what it throws beside the field, in a plain
  // sentence; null when it threw.
  function attempt(problems, fieldId, read) {
    var input = document.getElementById(fieldId);
    try {
      var v = read(input ? input.value : "");
      if (input) input.removeAttribute("aria-invalid");
      return v;
    } catch (problem) {
      if (typeof problem !== "string") throw problem;
      if (input) input.setAttribute("aria-invalid", "true");
      problems.push(problem + ".");
      return null;
    }
  }

  // say shows problems, or nothing.
  function say(element, problems) {
    element.textContent = problems.join(" ");
    element.className = problems.length ? "bad" : "";
  }

  return { make: make, field: field, choice: choice, facts: facts, table: table, attempt: attempt, say: say };
})();
