import type { Vec3 } from '../../solver/index';
import { lengthText, scaleBar } from './scale-bar';
import type { StageScene } from './stage-scene';
import type { StageMark } from './stage-types';

const SVG = 'http://www.w3.org/2000/svg';

export interface OverlayColours {
  ink: string;
  page: string;
  apricot: string;
}

/** Drafting marks laid over the picture: scale bar, centring marks, gauge crosses, lettered supports and loads. */
export class StageOverlay {
  private readonly svg: SVGSVGElement;

  constructor(host: HTMLElement) {
    this.svg = document.createElementNS(SVG, 'svg');
    this.svg.setAttribute('aria-hidden', 'true');
    this.svg.style.cssText = 'position:absolute;inset:0;width:100%;height:100%;pointer-events:none;overflow:hidden';
    host.append(this.svg);
  }

  draw(
    scene: StageScene,
    marks: readonly (StageMark & { vertex: number })[],
    unit: 'mm' | 'cm' | 'm',
    colours: OverlayColours,
  ): void {
    const { width, height } = scene;
    const parts: string[] = [];
    const line = (x1: number, y1: number, x2: number, y2: number, colour = colours.ink, w = 1.25) =>
      `<line x1="${x1}" y1="${y1}" x2="${x2}" y2="${y2}" stroke="${colour}" stroke-width="${w}"/>`;
    const half = width / 2;
    parts.push(line(half, 0, half, 10), line(half, height - 10, half, height));
    parts.push(line(0, height / 2, 10, height / 2), line(width - 10, height / 2, width, height / 2));
    const bar = scaleBar(scene.metresPerPixel);
    const [x, y] = [16, height - 22];
    parts.push(
      line(x, y - 7, x, y + 7),
      line(x + bar.pixels, y - 7, x + bar.pixels, y + 7),
      line(x, y, x + bar.pixels, y),
      `<path d="M${x} ${y} l8 -3 v6z M${x + bar.pixels} ${y} l-8 -3 v6z" fill="${colours.ink}"/>`,
      chip(x + bar.pixels / 2, y, lengthText(bar.metres, unit), colours.ink, colours.page, 'middle'),
    );
    for (const mark of marks) {
      const place = scene.project(scene.vertex(mark.vertex));
      if (!place) continue;
      const label = mark.text ? `${mark.id} ${mark.text}` : mark.id;
      if (mark.kind === 'gauge') {
        parts.push(
          `<circle cx="${place.x}" cy="${place.y}" r="6" fill="${colours.page}" stroke="${colours.ink}" stroke-width="1.5"/>`,
          line(place.x - 10, place.y, place.x + 10, place.y),
          line(place.x, place.y - 10, place.x, place.y + 10),
          chip(place.x + 14, place.y + 14, label, colours.ink, colours.page, 'start'),
        );
      } else if (mark.kind === 'support') {
        const hatch = [0, 1, 2, 3, 4, 5].map((k) =>
          line(place.x - 34 + 12 * k, place.y + 8, place.x - 26 + 12 * k, place.y),
        );
        parts.push(
          line(place.x - 36, place.y, place.x + 36, place.y),
          ...hatch,
          chip(place.x + 42, place.y + 2, label, colours.ink, colours.page, 'start'),
        );
      } else if (mark.direction) {
        parts.push(arrow(scene, mark.vertex, mark.direction, label, colours));
      }
    }
    this.svg.innerHTML = parts.join('');
  }

  remove(): void {
    this.svg.remove();
  }
}

function arrow(scene: StageScene, vertex: number, direction: Vec3, label: string, colours: OverlayColours): string {
  const tip = scene.vertex(vertex);
  const l = Math.hypot(...direction) || 1;
  const reach = 70 * scene.metresPerPixel;
  const to = scene.project(tip);
  const from = scene.project(tip.map((x, d) => x - (direction[d]! / l) * reach) as Vec3);
  if (!to || !from) return '';
  const [dx, dy] = [to.x - from.x, to.y - from.y];
  const length = Math.hypot(dx, dy) || 1;
  const [ux, uy] = [dx / length, dy / length];
  const base = { x: to.x - 11 * ux, y: to.y - 11 * uy };
  return (
    `<line x1="${from.x}" y1="${from.y}" x2="${base.x}" y2="${base.y}" stroke="${colours.apricot}" stroke-width="2"/>` +
    `<path d="M${to.x} ${to.y} L${base.x - 4 * uy} ${base.y + 4 * ux} L${base.x + 4 * uy} ${base.y - 4 * ux}z" fill="${colours.apricot}"/>` +
    chip(from.x, from.y - 12, label, colours.apricot, colours.page, 'middle')
  );
}

/** Lettering on a chip of the page's colour, so that it reads over the body. */
function chip(x: number, y: number, text: string, ink: string, page: string, anchor: 'start' | 'middle'): string {
  const width = 7.3 * text.length + 10;
  const left = anchor === 'middle' ? x - width / 2 : x;
  const safe = text.replace(/&/g, '&amp;').replace(/</g, '&lt;');
  return (
    `<rect x="${left}" y="${y - 9}" width="${width}" height="18" fill="${page}"/>` +
    `<text x="${left + width / 2}" y="${y + 4}" text-anchor="middle" font-family="'IBM Plex Mono', monospace" font-size="12" fill="${ink}">${safe}</text>`
  );
}
