/** Pictures larger than this are refused by one browser or another, px of a side. */
const LONGEST_SIDE = 16_384;

/**
 * An SVG file as PNG, `scale` px for each px of it. In the browser only. The picture is read from a data address, which `img-src 'self' data:` allows; it holds no outside
 * references, so that the canvas stays readable.
 *
 * @throws {RangeError} scale not positive, or a side beyond what browsers draw
 * @throws {Error} the browser cannot read the picture or make the file
 */
export async function plateSvgToPng(svg: string, scale: number): Promise<Blob> {
  const image = new Image();
  image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg)}`;
  try {
    await image.decode();
  } catch {
    throw new Error('the browser cannot read the drawing as a picture');
  }
  const [width, height] = [Math.round(image.naturalWidth * scale), Math.round(image.naturalHeight * scale)];
  if (!(width >= 1 && height >= 1 && width <= LONGEST_SIDE && height <= LONGEST_SIDE)) throw new RangeError(`no picture of ${width} by ${height} px`);
  const canvas = document.createElement('canvas');
  canvas.width = width;
  canvas.height = height;
  const context = canvas.getContext('2d');
  if (!context) throw new Error('the browser gives no canvas to draw on');
  context.drawImage(image, 0, 0, width, height);
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
  if (!blob) throw new Error('the browser made no PNG of the drawing');
  return blob;
}
