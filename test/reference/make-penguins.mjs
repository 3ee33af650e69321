// Writes test/reference/data/penguins.csv from the npm package vega-datasets (data/penguins.json; Gorman, Williams & Fraser 2014).
import { readFileSync, writeFileSync } from "node:fs";

const here = import.meta.dirname;
const rows = JSON.parse(readFileSync(`${here}/../../node_modules/vega-datasets/data/penguins.json`, "utf8"));
const names = {
  Species: "species",
  Island: "island",
  "Beak Length (mm)": "beak_length",
  "Beak Depth (mm)": "beak_depth",
  "Flipper Length (mm)": "flipper",
  "Body Mass (g)": "body_mass",
  Sex: "sex",
};
const cell = (value) => (value === null || value === "." ? "" : String(value));
const lines = [
  Object.values(names).join(","),
  ...rows.map((row) =>
    Object.keys(names)
      .map((key) => cell(row[key]))
      .join(","),
  ),
];
writeFileSync(`${here}/data/penguins.csv`, lines.join("\n") + "\n");
