import { OutOfDomainError } from "@quietband/core";

/** The size of a picture in pixels, completed and checked. */
export function pictureSize({
  width = 760,
  height = 480,
}: {
  readonly width?: number | undefined;
  readonly height?: number | undefined;
}): { readonly width: number; readonly height: number } {
  pictureWidth(width);
  requirePixels("height", height, 280);
  return { width, height };
}

/** The width of a picture in pixels, completed and checked. */
export function pictureWidth(width = 760): number {
  requirePixels("width", width, 400);
  return width;
}

function requirePixels(name: string, value: number, least: number): void {
  if (value >= least && value <= 4000) return;
  throw new OutOfDomainError(`${name} of a plot must be ${least} to 4000 pixels; got ${value}.`);
}
