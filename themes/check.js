// Tells whether a printed copy is current. The characters of the copy come
// behind the # of the address or are typed; the data stand in a script, so that
// the page works from a folder without a network. Texts are set as text: a
// hostile address runs nothing.
"use strict";

(function () {
  var form = document.getElementById("check"), field = document.getElementById("copy"), answer = document.getElementById("answer");

  function say(kind, head, lines, link) {
    answer.className = "state " + kind;
    answer.textContent = "";
    var strong = document.createElement("strong");
    strong.textContent = head;
    answer.appendChild(strong);
    if (link) {
      var a = document.createElement("a");
      a.href = link.path;
      a.textContent = link.text;
      answer.appendChild(document.createTextNode(" "));
      answer.appendChild(a);
    }
    if (lines.length) {
      var list = document.createElement("ul");
      lines.forEach(function (text) {
        var item = document.createElement("li");
        item.textContent = text;
        list.appendChild(item);
      });
      answer.appendChild(list);
    }
  }

  // One person types what another reads out: spaces, capitals and dashes of the
  // fingerprint do not matter.
  function parts(text) {
    var p = text.trim().toLowerCase().split("/").map(function (s) { return s.trim(); });
    if (p.length !== 3 || !/^[a-z0-9][a-z0-9-]*$/.test(p[0]) || !/^[0-9]+$/.test(p[1])) { return null; }
    return { id: p[0], revision: Number(p[1]), fingerprint: p[2].replace(/[^0-9a-f]/g, "") };
  }

  function plain(fingerprint) { return fingerprint.replace(/-/g, ""); }

  function check(text) {
    var copy = parts(text);
    if (!copy) {
      say("not-for-use", "These are not the characters of a copy.", ["Write material/revision/fingerprint as printed, for example cumn12ni/4/696a-5a36-1dbe."]);
      return;
    }
    var id = copy.id, now = Object.prototype.hasOwnProperty.call(copies.materials, id) ? copies.materials[id] : null;
    if (!now && Object.prototype.hasOwnProperty.call(copies.formerly, id)) {
      id = copies.formerly[id];
      now = copies.materials[id];
    }
    if (!now) {
      say("withdrawn", "Unknown: this reference has no material " + copy.id + ".", ["Look at the characters again. If they are right, ask who keeps the reference; do not use the copy."]);
      return;
    }
    var page = { path: "sheet/" + id + ".html", text: "The sheet that holds" };
    var same = copy.revision === now.revision && copy.fingerprint === plain(now.fingerprint);
    if (now.status === "withdrawn") {
      var by = now.replaced ? ["Replaced by " + now.replaced + "."] : [];
      say("withdrawn", "Withdrawn: " + now.name + " must not be used.", by.concat(now.reason ? [now.reason] : []), page);
    } else if (same && now.status === "released") {
      say("released", "Current: revision " + now.revision + " of " + now.name + ".", [], page);
    } else if (same) {
      say("not-for-use", "The latest of " + now.name + ", and " + now.status + ": not for use.", [], page);
    } else {
      superseded(copy, now, page);
    }
  }

  // Differences add up from the copy's statement to the present one.
  function superseded(copy, now, page) {
    var lines = [], known = false;
    now.past.some(function (p) {
      lines = p.changed.concat(lines);
      known = p.revision === copy.revision && plain(p.fingerprint) === copy.fingerprint;
      return known;
    });
    if (known) {
      say("withdrawn", "Superseded by revision " + now.revision + " of " + now.name + " (" + now.fingerprint + ").", lines, page);
    } else if (copy.revision < now.revision) {
      say("withdrawn", "Superseded by revision " + now.revision + " of " + now.name + " (" + now.fingerprint + ").", ["The copy's own statement is in no edition of this reference, so the differences are not known here."], page);
    } else {
      say("withdrawn", "Unknown: revision " + copy.revision + " with this fingerprint was never stated here.", ["This reference holds revision " + now.revision + " (" + now.fingerprint + "). It may be older than the copy, or the characters are wrong."], page);
    }
  }

  function fromAddress() {
    var text = "";
    try { text = decodeURIComponent(location.hash.slice(1)); } catch (e) { text = location.hash.slice(1); }
    if (text) { field.value = text; check(text); }
  }

  form.hidden = false;
  form.addEventListener("submit", function (e) { e.preventDefault(); check(field.value); });
  window.addEventListener("hashchange", fromAddress);
  fromAddress();
})();
