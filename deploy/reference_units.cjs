// Writes what a UCUM library says of unit conversions into CSV files that Go
// tests read. Usage: node reference_units.cjs FOLDER, with NODE_PATH at the
// folder of modules.
"use strict";
const fs = require("node:fs");
const path = require("node:path");
const ucum = require("@lhncbc/ucum-lhc").UcumLhcUtils.getInstance();
const version = require("@lhncbc/ucum-lhc/package.json").version;

const folder = process.argv[2];
const source = `# UCUM by @lhncbc/ucum-lhc ${version}`;

// Molar masses in g/mol: glucose, the two nitrogens of urea, ethanol, lactic
// acid, calcium, magnesium, phosphorus, and one haem of haemoglobin.
const molar = { glucose: 180.156, nitrogen: 28.0134, ethanol: 46.0684, lactate: 90.078, calcium: 40.078, magnesium: 24.305, phosphorus: 30.9738, haem: 16114.5 };

function convert(value, from, to, substance) {
  const result = ucum.convertUnitTo(from, value, to, { molecularWeight: substance ? molar[substance] : null });
  if (result.status !== "succeeded") throw new Error(`${value} ${from} to ${to}: ${result.msg.join(" ")}`);
  return result.toVal;
}

function write(name, columns, rows) {
  const lines = rows.map((row) => row.map((v) => (typeof v === "number" ? Number(v.toPrecision(13)) : v)).join(","));
  fs.writeFileSync(path.join(folder, name), [source, columns, ...lines].join("\n") + "\n");
}

// What the library of physiology converts: name, values, from, to, substance.
const conversions = [
  ["kPa to mmHg", [0.5, 4.67, 6, 8, 13.3, 101.325], "kPa", "mm[Hg]"],
  ["mmHg to kPa", [5, 35, 45, 60, 100, 760], "mm[Hg]", "kPa"],
  ["F to C", [59, 95, 98.6, 101.3, 110], "[degF]", "Cel"],
  ["in to cm", [18, 60, 64, 70, 84], "[in_i]", "cm"],
  ["% to 1", [21, 40, 88, 100], "%", "1"],
  ["glucose mg/dL to mmol/L", [20, 90, 180, 540], "mg/dL", "mmol/L", "glucose"],
  ["urea nitrogen mg/dL to mmol/L", [5, 28, 90], "mg/dL", "mmol/L", "nitrogen"],
  ["ethanol mg/dL to mmol/L", [10, 80, 300], "mg/dL", "mmol/L", "ethanol"],
];

// What a typed line may hold: how it is typed around the value, the quantity
// it is read as, values, and the units of both sides.
const typed = [
  ["pb # kpa", "pb", [68.5, 95, 101.3], "kPa", "mm[Hg]"],
  ["pb # mbar", "pb", [850, 1013], "mbar", "mm[Hg]"],
  ["pco2 # kpa", "paco2", [4.7, 7.3, 11.2], "kPa", "mm[Hg]"],
  ["po2 # kpa", "pao2", [6.1, 8, 12.9], "kPa", "mm[Hg]"],
  ["etco2 # kpa", "etco2", [4.1, 6.2], "kPa", "mm[Hg]"],
  ["temp # F", "temp", [95, 99.1, 103.6], "[degF]", "Cel"],
  ["weight # lb", "weight", [120, 154, 231], "[lb_av]", "kg"],
  ["height # in", "height", [58, 64, 71], "[in_i]", "cm"],
  ["altitude # ft", "altitude", [5280, 8000, 11942], "[ft_i]", "m"],
  ["glucose # mg/dl", "glucose", [54, 126, 480], "mg/dL", "mmol/L", "glucose"],
  ["lactate # mg/dl", "lactate", [9, 18, 54], "mg/dL", "mmol/L", "lactate"],
  ["ica # mg/dl", "calcium", [3.9, 4.6], "mg/dL", "mmol/L", "calcium"],
  ["mag # mg/dl", "magnesium", [1.7, 2.4], "mg/dL", "mmol/L", "magnesium"],
  ["phos # mg/dl", "phosphate", [2.6, 4.5], "mg/dL", "mmol/L", "phosphorus"],
  ["alb # g/dl", "albumin", [2.1, 4.2], "g/dL", "g/L"],
  ["hb # g/l", "hb", [72, 140], "g/L", "g/dL"],
  ["hb # mmol/l", "hb", [5.2, 8.5], "mmol/L", "g/dL", "haem"],
  ["fio2 # %", "fio2", [28, 60], "%", "1"],
  ["vt # l", "vt", [0.38, 0.52], "L", "mL"],
  ["# months old", "age", [6, 18], "mo", "a"],
];

write("units.csv", "conversion,value,reference",
  conversions.flatMap(([name, values, ...units]) => values.map((v) => [name, v, convert(v, ...units)])));
write("units_typed.csv", "typed,quantity,reference",
  typed.flatMap(([how, quantity, values, ...units]) => values.map((v) => [how.replace("#", v), quantity, convert(v, ...units)])));
