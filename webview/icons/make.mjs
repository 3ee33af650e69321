// Draws the extension's icon: two intervals on one axis and the slant between them. `node webview/icons/make.mjs` writes the PNG.
import { deflateSync } from "node:zlib";
import { writeFileSync } from "node:fs";

const SIZE = 256;
const FINE = 4; // samples a pixel and axis

// shapes in a 16 × 16 square: [x1, y1, x2, y2, half width, colour]
const PAPER = [244, 241, 234];
const GROUND = [31, 42, 56];
const WARM = [232, 150, 76];
const STROKES = [
  [8, 2.6, 8, 13.4, 0.22, [110, 124, 142]],
  [9.2, 4.6, 14, 4.6, 0.42, PAPER],
  [2, 11.4, 6.8, 11.4, 0.42, PAPER],
  [11.6, 4.6, 4.4, 11.4, 0.42, WARM],
];
const DOTS = [
  [11.6, 4.6, 1.35, PAPER],
  [4.4, 11.4, 1.35, WARM],
];

const distance = (x, y, [x1, y1, x2, y2]) => {
  const dx = x2 - x1;
  const dy = y2 - y1;
  const t = Math.max(0, Math.min(1, ((x - x1) * dx + (y - y1) * dy) / (dx * dx + dy * dy)));
  return Math.hypot(x - x1 - t * dx, y - y1 - t * dy);
};

/** Colour and cover at a point of the 16 × 16 square: a rounded ground, then strokes, then dots. */
function at(x, y) {
  const corner = 3;
  const cx = Math.max(corner, Math.min(16 - corner, x));
  const cy = Math.max(corner, Math.min(16 - corner, y));
  if (Math.hypot(x - cx, y - cy) > corner) return null;
  let colour = GROUND;
  for (const stroke of STROKES) if (distance(x, y, stroke) <= stroke[4]) colour = stroke[5];
  for (const [dx, dy, r, c] of DOTS) if (Math.hypot(x - dx, y - dy) <= r) colour = c;
  return colour;
}

const rows = Buffer.alloc(SIZE * (SIZE * 4 + 1));
for (let py = 0; py < SIZE; py++) {
  for (let px = 0; px < SIZE; px++) {
    const sum = [0, 0, 0];
    let cover = 0;
    for (let i = 0; i < FINE * FINE; i++) {
      const colour = at(((px + ((i % FINE) + 0.5) / FINE) * 16) / SIZE, ((py + (Math.floor(i / FINE) + 0.5) / FINE) * 16) / SIZE);
      if (!colour) continue;
      cover++;
      for (let c = 0; c < 3; c++) sum[c] += colour[c];
    }
    const pixel = cover ? [...sum.map((s) => Math.round(s / cover)), Math.round((255 * cover) / FINE ** 2)] : [0, 0, 0, 0];
    rows.set(pixel, py * (SIZE * 4 + 1) + 1 + px * 4);
  }
}

const crcTable = Int32Array.from({ length: 256 }, (_, n) => {
  let c = n;
  for (let k = 0; k < 8; k++) c = c & 1 ? 0xedb88320 ^ (c >>> 1) : c >>> 1;
  return c;
});
function chunk(type, data) {
  const body = Buffer.concat([Buffer.from(type, "latin1"), data]);
  let crc = -1;
  for (const byte of body) crc = crcTable[(crc ^ byte) & 255] ^ (crc >>> 8);
  const out = Buffer.alloc(body.length + 8);
  out.writeUInt32BE(data.length, 0);
  body.copy(out, 4);
  out.writeUInt32BE((crc ^ -1) >>> 0, body.length + 4);
  return out;
}
const header = Buffer.alloc(13);
header.writeUInt32BE(SIZE, 0);
header.writeUInt32BE(SIZE, 4);
header.set([8, 6, 0, 0, 0], 8);
const png = Buffer.concat([
  Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
  chunk("IHDR", header),
  chunk("IDAT", deflateSync(rows, { level: 9 })),
  chunk("IEND", Buffer.alloc(0)),
]);
writeFileSync(new URL("icon.png", import.meta.url), png);
