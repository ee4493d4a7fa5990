// The one place that turns metres into pixels and back. The scale is the same both ways: coordinates are never exaggerated.

/** A view of the section: what is shown where. */
export interface Camera {
  /** Chainage at the left end of the plot, m. */
  readonly left: number;
  /** Elevation at the top of the plot, m. */
  readonly top: number;
  /** Pixels per metre. */
  readonly scale: number;
  /** Size of the plot, pixels. */
  readonly width: number;
  readonly height: number;
}

/** Extent of what is drawn, m. */
export interface Extent {
  readonly xMin: number;
  readonly xMax: number;
  readonly yMin: number;
  readonly yMax: number;
}

/**
 * Fits an extent into a plot of a given width, no taller than a limit.
 *
 * @param extent - What to show, m.
 * @param width - Pixels.
 * @param maxHeight - Pixels.
 * @param minHeight - Pixels.
 * @returns The camera, with the extent centred.
 */
export function fitCamera(extent: Extent, width: number, maxHeight: number, minHeight: number): Camera {
  const spanX = Math.max(extent.xMax - extent.xMin, 1e-9);
  const spanY = Math.max(extent.yMax - extent.yMin, 1e-9);
  const scale = Math.min(width / spanX, maxHeight / spanY);
  const height = Math.min(maxHeight, Math.max(minHeight, spanY * scale));
  return {
    left: (extent.xMin + extent.xMax) / 2 - width / scale / 2,
    top: (extent.yMin + extent.yMax) / 2 + height / scale / 2,
    scale,
    width,
    height,
  };
}

/**
 * Moves closer or further about a point that stays where it is.
 *
 * @param camera - The view.
 * @param factor - Above 1 is closer.
 * @param px - Pixels from the left.
 * @param py - Pixels from the top.
 * @param least - Smallest scale allowed, pixels per metre.
 * @returns The new view.
 */
export function zoomCamera(camera: Camera, factor: number, px: number, py: number, least: number): Camera {
  const scale = Math.min(Math.max(camera.scale * factor, least), least * 400);
  return {
    ...camera,
    scale,
    left: camera.left + px / camera.scale - px / scale,
    top: camera.top - py / camera.scale + py / scale,
  };
}

/**
 * Pixels from the left for a chainage.
 *
 * @param camera - The view.
 * @param x - Chainage, m.
 * @returns Pixels.
 */
export function toScreenX(camera: Camera, x: number): number {
  return (x - camera.left) * camera.scale;
}

/**
 * Pixels from the top for an elevation.
 *
 * @param camera - The view.
 * @param y - Elevation, m.
 * @returns Pixels.
 */
export function toScreenY(camera: Camera, y: number): number {
  return (camera.top - y) * camera.scale;
}

/**
 * The point of the section under a pixel.
 *
 * @param camera - The view.
 * @param px - Pixels from the left.
 * @param py - Pixels from the top.
 * @returns Chainage and elevation, m.
 */
export function toWorld(camera: Camera, px: number, py: number): [number, number] {
  return [camera.left + px / camera.scale, camera.top - py / camera.scale];
}
