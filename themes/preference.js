// What the reader likes to read in: a unit of temperature, a unit of
// resistivity, a decimal mark for copies. It is kept in the reader's browser
// and never touches the controlled sheet.
"use strict";

var preference = (function () {
  var kept = {};
  try { kept = JSON.parse(localStorage.getItem("read-in")) || {}; } catch (refused) { kept = {}; }

  function known(kind, symbol) { return typeof symbol === "string" && quantity.find(kind, symbol) ? symbol : ""; }

  var temperatureUnit = known("temperature", kept.temperature) || "°C";
  var resistivityUnit = known("resistivity", kept.resistivity);

  return {
    temperatureUnit: temperatureUnit,
    resistivityUnit: resistivityUnit, // "" for the house unit
    mark: kept.mark === "," ? "," : ".",

    // temperature prints kelvin in the reader's unit, at most three decimals.
    temperature: function (t) {
      var u = quantity.find("temperature", temperatureUnit);
      return numbers.united(numbers.trimmed(quantity.fromSI(u, t), 3), u.s);
    },

    // marked puts the reader's decimal mark into a number for copying, and
    // a hyphen where a spreadsheet would not know a true minus.
    marked: function (text) {
      return text.replace(/\u2212(?=\d)/g, "-").replace(/(\d)\.(?=\d)/g, kept.mark === "," ? "$1," : "$1.").replace(/\u202f/g, " ");
    },

    keep: function (choice) {
      try { localStorage.setItem("read-in", JSON.stringify(choice)); } catch (refused) { return false; }
      return true;
    }
  };
})();
