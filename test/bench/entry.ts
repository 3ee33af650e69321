/** What the benchmark reaches of the program: the two doors, and the factor behind the second. */
export { ReaderMemory } from "../../src/data/fast/memory";
export { readTable } from "../../src/data/read";
export { compare } from "../../src/engine/compare";
export { buildDesign } from "../../src/engine/design/build";
export { factorise } from "../../src/engine/linear/factorise";
export { resolveQuestion } from "../../src/engine/question/resolve";
export { findRows } from "../../src/engine/rows/common";
export { SecondThread } from "../../src/threads/second";
