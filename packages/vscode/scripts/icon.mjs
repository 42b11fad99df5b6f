// Draws the extension's icon (256 px): a drop of oil with the flow triangle of ISO 1219 in it, on a line with its junction dot.
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { png } from './png.mjs';

const SIZE = 256;
const FINE = 4; // samples a pixel and direction

const between = (a, b, t) => a.map((v, i) => v + (b[i] - v) * t);

function inRoundedSquare(x, y) {
  const half = 124;
  const radius = 52;
  const dx = Math.max(Math.abs(x - 128) - (half - radius), 0);
  const dy = Math.max(Math.abs(y - 128) - (half - radius), 0);
  return Math.hypot(dx, dy) <= radius;
}

/** A drop: a circle below, its two tangents meeting in the tip above. `grow` in px. */
function inDrop(x, y, grow) {
  const [cx, cy, r, tip] = [128, 142, 62 + grow, 26 - grow * 1.6];
  if (Math.hypot(x - cx, y - cy) <= r) return true;
  const height = cy - tip;
  const touchY = cy - (r * r) / height;
  if (y < tip || y > touchY) return false;
  const touchX = (r * Math.sqrt(height * height - r * r)) / height;
  return Math.abs(x - cx) <= (touchX * (y - tip)) / (touchY - tip);
}

function inTriangle(x, y) {
  const [top, bottom, half] = [106, 176, 40];
  return y >= top && y <= bottom && Math.abs(x - 128) <= (half * (y - top)) / (bottom - top);
}

const inLine = (x, y) => Math.abs(y - 226) <= 5 && x >= 30 && x <= 226;
const inStem = (x, y) => Math.abs(x - 128) <= 5 && y >= 196 && y <= 226;
const inDot = (x, y) => Math.hypot(x - 128, y - 226) <= 12;

/** Colour at a point, RGBA 0..255, or undefined outside the picture. */
function colour(x, y) {
  if (!inRoundedSquare(x, y)) return undefined;
  const ground = between([27, 58, 82], [14, 32, 48], y / SIZE);
  if (inDrop(x, y, 0)) {
    if (inTriangle(x, y)) return [20, 41, 59, 255];
    const shine = Math.hypot(x - 104, y - 126) / 110;
    return [...between([255, 206, 92], [232, 138, 18], Math.min(shine, 1)), 255];
  }
  if (inDrop(x, y, 8)) return [...ground, 255];
  if (inLine(x, y) || inStem(x, y) || inDot(x, y)) return [236, 240, 243, 255];
  return [...ground, 255];
}

export function icon() {
  const pixels = new Uint8Array(SIZE * SIZE * 4);
  for (let y = 0; y < SIZE; y++) {
    for (let x = 0; x < SIZE; x++) {
      const sum = [0, 0, 0];
      let covered = 0;
      for (let j = 0; j < FINE; j++) {
        for (let i = 0; i < FINE; i++) {
          const c = colour(x + (i + 0.5) / FINE, y + (j + 0.5) / FINE);
          if (!c) continue;
          covered++;
          for (let k = 0; k < 3; k++) sum[k] += c[k];
        }
      }
      if (covered === 0) continue;
      pixels.set([...sum.map((v) => Math.round(v / covered)), Math.round((255 * covered) / FINE ** 2)], (y * SIZE + x) * 4);
    }
  }
  return png(SIZE, SIZE, pixels);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) writeFileSync(new URL('../images/icon.png', import.meta.url), icon());
