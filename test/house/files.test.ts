import { expect, test } from "vitest";
import { filesIn, textOf } from "./sources";

const LONGEST = 300;
const sources = filesIn(["src", "webview", "test", "samples"], /\.(ts|mjs|css)$/);

test(`no source file is longer than ${LONGEST} lines`, () => {
  const long = sources
    .map((file) => ({ file, lines: textOf(file).split("\n").length - 1 }))
    .filter(({ lines }) => lines > LONGEST);
  expect(long).toEqual([]);
});

/** Words and calls that must not stand in a source, with where they may. */
const BANNED: readonly { readonly what: RegExp; readonly in: RegExp }[] = [
  { what: /\b(TODO|FIXME|XXX|HACK)\b/, in: /^(src|webview|test|samples)\// },
  { what: /\.(innerHTML|outerHTML|insertAdjacentHTML)\b|document\.write\b/, in: /^webview\// },
  { what: /\bMath\.random\b/, in: /^(src|webview|samples)\// },
  { what: /\beval\(|new Function\(/, in: /^(src|webview)\// },
  { what: /\bfetch\(|XMLHttpRequest|node:https?|node:net\b/, in: /^(src|webview)\// },
  { what: /\.only\(|\.skip\(/, in: /^test\// },
  { what: /\bconsole\.log\(/, in: /^(src\/(engine|data|plan|report|host)|webview)\// },
];

test("no source holds a word or call that has no place in it", () => {
  const found = sources
    .filter((file) => !file.startsWith("test/house/"))
    .flatMap((file) => {
      const text = textOf(file);
      return BANNED.filter((rule) => rule.in.test(file) && rule.what.test(text)).map(
        (rule) => `${file}: ${rule.what.exec(text)?.[0]}`,
      );
    });
  expect(found).toEqual([]);
});
