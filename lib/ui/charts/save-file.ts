/** Hands a file to the browser's own download. */
export function saveBlob(blob: Blob, fileName: string): void {
  const url = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = url;
  link.download = fileName;
  document.body.append(link);
  link.click();
  link.remove();
  // The click has started the download; the address may go once the event has been handled.
  setTimeout(() => URL.revokeObjectURL(url), 60_000);
}

export type PictureAnswer =
  | { readonly ok: true; readonly blob: Blob }
  | { readonly ok: false; readonly reason: 'no-canvas' | 'not-drawn' };

/** Draws an SVG at twice its size. The SVG carries its own colours and sizes, no style sheet reaches it here. */
export async function svgToPng(svg: SVGSVGElement, scale = 2): Promise<PictureAnswer> {
  const width = svg.width.baseVal.value;
  const height = svg.height.baseVal.value;
  const text = new XMLSerializer().serializeToString(svg);
  const url = URL.createObjectURL(new Blob([text], { type: 'image/svg+xml;charset=utf-8' }));
  try {
    const image = await loaded(url, width, height);
    const canvas = document.createElement('canvas');
    canvas.width = width * scale;
    canvas.height = height * scale;
    const pen = canvas.getContext('2d');
    if (pen === null) return { ok: false, reason: 'no-canvas' };
    pen.drawImage(image, 0, 0, canvas.width, canvas.height);
    const blob = await new Promise<Blob | null>((done) => canvas.toBlob(done, 'image/png'));
    return blob === null ? { ok: false, reason: 'not-drawn' } : { ok: true, blob };
  } catch {
    return { ok: false, reason: 'not-drawn' };
  } finally {
    URL.revokeObjectURL(url);
  }
}

function loaded(url: string, width: number, height: number): Promise<HTMLImageElement> {
  return new Promise((done, fail) => {
    const image = new Image(width, height);
    image.onload = () => done(image);
    image.onerror = () => fail(new Error('The drawing was not accepted as a picture.'));
    image.src = url;
  });
}
