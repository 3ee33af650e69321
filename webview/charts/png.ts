/** Pixels of the picture for one of the drawing: sharp on paper and on dense screens. */
const SHARPNESS = 2;

/**
 * An SVG as a PNG in base64. Drawn from a data address, which the page's policy allows; nothing is loaded.
 * @throws where the picture cannot be drawn
 */
export async function pngOf(svg: string): Promise<string> {
  const image = new Image();
  image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg)}`;
  await image.decode();
  const canvas = document.createElement("canvas");
  canvas.width = image.naturalWidth * SHARPNESS;
  canvas.height = image.naturalHeight * SHARPNESS;
  const pen = canvas.getContext("2d");
  if (!pen) throw new Error("no canvas");
  pen.drawImage(image, 0, 0, canvas.width, canvas.height);
  const [, data] = canvas.toDataURL("image/png").split("base64,");
  // a canvas too large for the browser gives an empty address
  if (!data) throw new Error("no picture");
  return data;
}
