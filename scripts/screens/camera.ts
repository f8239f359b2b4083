/** A pinhole camera before a flat screen. Places on the screen and in the photograph are pixels, centres whole. */
export interface Camera {
  toPhoto: (place: Place) => Place;
  toScreen: (place: Place) => Place;
}

export interface Place {
  x: number;
  y: number;
}

export interface Pose {
  /** Turn about the upright, the level and the viewing axis, degrees. */
  yaw: number;
  pitch: number;
  roll: number;
}

/** Focal length as a multiple of the photograph's width: a telephone's ordinary lens, common practice, no source. */
const FOCAL = 1.1;
/** Share of the photograph that the screen with its border may fill. */
const FILL = 0.92;

/** Stands the camera as near as the whole screen (`border` pixels around it) still fits. No lens distortion. */
export function standBefore(
  screen: { width: number; height: number; border: number },
  photo: { width: number; height: number },
  pose: Pose,
): Camera {
  const { width, height, border } = screen;
  const outer = [-border, width - 1 + border].flatMap((x) =>
    [-border, height - 1 + border].map((y) => ({ x, y })),
  );
  let near = 0.3 * width;
  let far = 20 * width;
  for (let i = 0; i < 60; i++) {
    const middle = (near + far) / 2;
    const at = outer.map(cameraAt(middle, screen, photo, pose).toPhoto);
    const fits = at.every(
      (p) =>
        Math.abs(p.x - photo.width / 2) < (FILL * photo.width) / 2 &&
        Math.abs(p.y - photo.height / 2) < (FILL * photo.height) / 2,
    );
    if (fits) far = middle;
    else near = middle;
  }
  return cameraAt(far, screen, photo, pose);
}

/** Projects by rotation, distance and focal length; back by the point where the viewing ray meets the screen. */
function cameraAt(
  distance: number,
  screen: { width: number; height: number },
  photo: { width: number; height: number },
  { yaw, pitch, roll }: Pose,
): Camera {
  const r = rotation(yaw, pitch, roll);
  const focal = FOCAL * photo.width;
  const middle = { x: (photo.width - 1) / 2, y: (photo.height - 1) / 2 };
  const origin = { x: (screen.width - 1) / 2, y: (screen.height - 1) / 2 };
  return {
    toPhoto: ({ x, y }) => {
      const u = x - origin.x;
      const v = y - origin.y;
      const z = r[6] * u + r[7] * v + distance;
      return {
        x: middle.x + (focal * (r[0] * u + r[1] * v)) / z,
        y: middle.y + (focal * (r[3] * u + r[4] * v)) / z,
      };
    },
    toScreen: ({ x, y }) => {
      const ray = [(x - middle.x) / focal, (y - middle.y) / focal, 1];
      const t = (r[8] * distance) / (r[2] * ray[0] + r[5] * ray[1] + r[8]);
      const p = [t * ray[0], t * ray[1], t - distance];
      return {
        x: origin.x + r[0] * p[0] + r[3] * p[1] + r[6] * p[2],
        y: origin.y + r[1] * p[0] + r[4] * p[1] + r[7] * p[2],
      };
    },
  };
}

/** Row by row: about the viewing axis, then the level one, then the upright one. */
function rotation(yawDegrees: number, pitchDegrees: number, rollDegrees: number): number[] {
  const [a, b, c] = [yawDegrees, pitchDegrees, rollDegrees].map((d) => (d * Math.PI) / 180);
  const yaw = [Math.cos(a), 0, Math.sin(a), 0, 1, 0, -Math.sin(a), 0, Math.cos(a)];
  const pitch = [1, 0, 0, 0, Math.cos(b), -Math.sin(b), 0, Math.sin(b), Math.cos(b)];
  const roll = [Math.cos(c), -Math.sin(c), 0, Math.sin(c), Math.cos(c), 0, 0, 0, 1];
  return product(yaw, product(pitch, roll));
}

function product(a: number[], b: number[]): number[] {
  return a.map((_, i) => {
    const row = 3 * Math.floor(i / 3);
    const column = i % 3;
    return a[row] * b[column] + a[row + 1] * b[3 + column] + a[row + 2] * b[6 + column];
  });
}
