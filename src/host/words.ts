/** The few sentences of the editor around the panel (pickers, messages). What is said about data and results is in report/wording. */
export const words = {
  panelTitle: (file: string) => `Comparison: ${file}`,
  pick: "Choose a CSV or a plan to compare",
  nothingToPick: "There is no .csv, .tsv or .slantwise.json file in this folder.",
  notAFile: (name: string) => `${name} is not a file on this machine, so it cannot be watched. Save it to a folder first.`,
  notOurs: (name: string) => `${name} is not a .csv, .tsv or .slantwise.json file.`,
  noPanel: "Open a comparison first: right-click a CSV and choose Open Comparison.",
  nothingToCopy: "There is no result to copy yet.",
  copied: { markdown: "Copied as Markdown.", table: "Copied as a table." },
  saveFigure: "Save the figure",
  saved: (file: string) => `Saved as ${file}.`,
  notSaved: (file: string) => `${file} could not be written.`,
  figure: "figure",
  noLine: (file: string) => `${file} could not be opened in the editor.`,
  threadLost: "the comparison stopped; save the file or choose Read Again to repeat it",
} as const;
