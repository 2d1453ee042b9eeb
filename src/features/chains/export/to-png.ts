/** The longest side that browsers draw, px. */
const LONGEST_SIDE = 16_000;

/**
 * An SVG that stands alone as a PNG.
 * @param scale pixels for one of the drawing; fewer where the picture would be larger than a browser can draw
 * @throws Error where the browser cannot read the drawing
 */
export async function toPng(svg: string, scale: number): Promise<Blob> {
  const url = URL.createObjectURL(new Blob([svg], { type: 'image/svg+xml' }));
  try {
    const image = new Image();
    image.src = url;
    await image.decode();
    const fits = Math.min(scale, LONGEST_SIDE / Math.max(image.width, image.height));
    const canvas = document.createElement('canvas');
    canvas.width = Math.round(image.width * fits);
    canvas.height = Math.round(image.height * fits);
    canvas.getContext('2d')!.drawImage(image, 0, 0, canvas.width, canvas.height);
    return await blobOf(canvas);
  } finally {
    URL.revokeObjectURL(url);
  }
}

function blobOf(canvas: HTMLCanvasElement): Promise<Blob> {
  return new Promise((resolve, reject) => {
    canvas.toBlob(
      (blob) => (blob ? resolve(blob) : reject(new Error('The browser could not draw the picture.'))),
      'image/png',
    );
  });
}
