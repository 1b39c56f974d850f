// The live view's own script; published pages do not have it. It waits for
// news, shows findings in a strip at the foot, and shows the page anew when the
// reference was saved, with the scroll and the opened parts as they were.
"use strict";

(function () {
  var has = 0, strip = document.createElement("details"), head = document.createElement("summary"), list = document.createElement("ul");
  strip.className = "follow-strip";
  strip.appendChild(head);
  strip.appendChild(list);
  head.textContent = "following";
  document.body.appendChild(strip);

  var key = "follow " + location.pathname, left = null;
  try {
    left = JSON.parse(sessionStorage.getItem(key));
    sessionStorage.removeItem(key);
  } catch (e) { left = null; }
  if (left) {
    document.querySelectorAll("details").forEach(function (d, i) { if (left.open[i]) { d.open = true; } });
    window.scrollTo(left.x, left.y);
  }

  function anew() {
    var open = Array.prototype.map.call(document.querySelectorAll("details"), function (d) { return d.open; });
    try { sessionStorage.setItem(key, JSON.stringify({ x: window.scrollX, y: window.scrollY, open: open })); } catch (e) { open = null; }
    location.reload();
  }

  function show(news) {
    head.textContent = news.counts;
    strip.classList.toggle("follow-error", news.findings.some(function (f) { return f.severity === "error"; }));
    list.textContent = "";
    news.findings.slice(0, 200).forEach(function (f) {
      var item = document.createElement("li");
      item.textContent = (f.place ? f.place + ": " : "") + f.severity + ": " + f.message + (f.mend ? " (" + f.mend + ")" : "");
      list.appendChild(item);
    });
  }

  // The page is fetched anew and compared: a save that does not touch it does
  // not move it.
  var shown = null;
  function page() {
    return fetch(location.href, { cache: "no-store" }).then(function (r) { return r.text(); });
  }

  function ask() {
    fetch("/.follow/news?has=" + has).then(function (r) { return r.json(); }).then(function (news) {
      var first = has === 0, other = news.version !== has;
      has = news.version;
      show(news);
      if (!other) { return ask(); }
      return page().then(function (text) {
        if (first || shown === null) { shown = text; return ask(); }
        if (text !== shown) { anew(); return undefined; }
        return ask();
      });
    }).catch(function () {
      head.textContent = "the view has ended; start it again to follow";
      setTimeout(ask, 1500);
    });
  }
  ask();
})();
