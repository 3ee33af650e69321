import { PROTOCOL_VERSION } from "../protocol";
import type { PageMessage } from "../protocol";

type Fields = Readonly<Record<string, unknown>>;
type Check = (fields: Fields) => boolean;

const text: (value: unknown) => boolean = (value) => typeof value === "string" && value.length < 100_000;
const texts = (value: unknown) => Array.isArray(value) && value.length <= 10_000 && value.every(text);
const finite = (value: unknown) => typeof value === "number" && Number.isFinite(value);
const line = (value: unknown) => Number.isInteger(value) && (value as number) >= 1;
/** An SVG of thousands of rows is some hundred kB, its picture a few MB. */
const SVG_MOST = 8_000_000;
const PNG_MOST = 32_000_000;
const PNG_START = "iVBORw0KGgo";

const fields = (value: unknown): value is Fields => typeof value === "object" && value !== null && !Array.isArray(value);

const CHANGES: Readonly<Record<string, Check>> = {
  outcome: (change) => text(change["column"]),
  exposure: (change) => text(change["column"]),
  reference: (change) => text(change["level"]),
  covariates: (change) => texts(change["columns"]),
  margin: ({ value }) => value === null || (finite(value) && (value as number) > 0),
  average: ({ over }) => over === null || text(over),
  per: ({ value }) => finite(value) && (value as number) > 0,
  sets: ({ sets }) => sets === "each" || sets === "steps" || sets === "every",
  report: (change) => texts(change["columns"]),
};

const orNull = (check: (value: unknown) => boolean) => (value: unknown) => value === null || check(value);
const place = (value: unknown) => Number.isInteger(value) && (value as number) >= 0;

const MESSAGES: Readonly<Record<PageMessage["type"], Check>> = {
  ready: () => true,
  choose: ({ change }) =>
    fields(change) &&
    typeof change["key"] === "string" &&
    Object.hasOwn(CHANGES, change["key"]) &&
    CHANGES[change["key"]](change),
  filter: ({ filter }) => filter === null || (fields(filter) && texts(filter["holds"]) && texts(filter["omits"])),
  copy: ({ id, as }) => finite(id) && (as === "markdown" || as === "table"),
  openLine: (message) => line(message["line"]) && (message["inPlan"] === undefined || typeof message["inPlan"] === "boolean"),
  readAgain: () => true,
  savePlan: () => true,
  slopes: ({ choice }) =>
    choice === null ||
    (fields(choice) && orNull(place)(choice["set"]) && orNull(text)(choice["modifier"]) && orNull(place)(choice["contrast"])),
  saveFigure: ({ id, figure }) => finite(id) && fields(figure) && text(figure["name"]) && picture(figure["as"], figure["data"]),
};

function picture(as: unknown, data: unknown): boolean {
  if (typeof data !== "string") return false;
  if (as === "svg") return data.length <= SVG_MOST && data.startsWith("<svg ");
  return as === "png" && data.length <= PNG_MOST && data.startsWith(PNG_START) && /^[A-Za-z0-9+/]+={0,2}$/.test(data);
}

/** A message is data from a page: believed only when it has the protocol's version and shape. */
export function isPageMessage(value: unknown): value is PageMessage {
  if (!fields(value) || value["v"] !== PROTOCOL_VERSION || typeof value["type"] !== "string") return false;
  return Object.hasOwn(MESSAGES, value["type"]) && MESSAGES[value["type"] as PageMessage["type"]](value);
}
