import { CAUTION_SHORT } from '../components/caution-text.ts';
import { embeddedFontRules } from './embedded-fonts.ts';
import { escapeXml, fileNameOf, resolveTokens, wrapText } from './export-text.ts';
import { tokenReader } from './tokens.ts';

export type ExportFormat = 'svg' | 'png';

export type DrawingExport = {
  /** Printed at the head of the drawing, and made into the file's name. */
  title: string;
  /** Which drawing it is: "strips", "ledger". */
  part: string;
  format: ExportFormat;
};

const MARGIN = 24;
const HEAD = 44;
const CAUTION_SIZE = 12;
const CAUTION_LINE = 17;
/** Pixels of a PNG per pixel on screen. */
const PNG_SCALE = 2;

/**
 * Saves a drawing as a file, as it is on screen (day or night), with its title above and the caution below.
 *
 * @param element  holds the drawing: every svg in it is taken, in order, at its place
 * @throws when a font cannot be loaded or the browser cannot draw the picture
 */
export async function exportDrawing(element: HTMLElement, { title, part, format }: DrawingExport): Promise<void> {
  const svg = drawingSvg(element, title, await embeddedFontRules());
  const blob = format === 'svg' ? new Blob([svg], { type: 'image/svg+xml' }) : await rasterise(svg);
  saveFile(blob, fileNameOf(title, part, format));
}

/** Hands a file to the person. */
export function saveFile(content: Blob, name: string): void {
  const link = document.createElement('a');
  link.href = URL.createObjectURL(content);
  link.download = name;
  link.click();
  // The browser reads the address after the click returns.
  setTimeout(() => URL.revokeObjectURL(link.href), 60_000);
}

/** One self-contained SVG of all drawings in an element. */
export function drawingSvg(element: HTMLElement, title: string, fontRules: string): string {
  const box = element.getBoundingClientRect();
  const layers = [...element.querySelectorAll('svg')].filter((svg) => !svg.parentElement?.closest('svg'));
  const bottom = Math.max(0, ...layers.map((svg) => svg.getBoundingClientRect().bottom - box.top));
  const width = Math.ceil(box.width) + 2 * MARGIN;
  const caution = wrapText(CAUTION_SHORT, box.width, CAUTION_SIZE);
  const cautionTop = MARGIN + HEAD + Math.ceil(bottom) + 28;
  const height = cautionTop + caution.length * CAUTION_LINE + MARGIN;
  const drawn = layers.map((svg) => layerSvg(svg, box)).join('');
  const lines = caution.map(
    (line, i) => `<text class="c" x="${MARGIN}" y="${cautionTop + i * CAUTION_LINE}">${escapeXml(line)}</text>`,
  );
  const whole = `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}"><title>${escapeXml(title)}</title><style>${fontRules}${LETTERING}</style><rect width="${width}" height="${height}" fill="var(--paper)"/><text class="t" x="${MARGIN}" y="${MARGIN + 18}">${escapeXml(title)}</text><text class="c" x="${width - MARGIN}" y="${MARGIN + 18}" text-anchor="end">Voltiplano</text><g transform="translate(${MARGIN} ${MARGIN + HEAD})">${drawn}</g>${lines.join('')}</svg>`;
  return resolveTokens(whole, tokenReader(element));
}

/** The rules of src/styles/base.css that drawings rely on. */
const LETTERING =
  'text{font-family:var(--f-text);fill:var(--ink2);font-size:12px}.n{font-family:var(--f-num);letter-spacing:-.03em}' +
  '.h{fill:var(--ink);font-weight:600;font-size:13px}.halo{paint-order:stroke;stroke:var(--paper);stroke-width:4px;stroke-linejoin:round}' +
  '.t{font-family:var(--f-head);font-weight:600;font-size:18px;fill:var(--ink)}.c{fill:var(--ink3)}';

function layerSvg(svg: SVGSVGElement, box: DOMRect): string {
  const place = svg.getBoundingClientRect();
  const copy = svg.cloneNode(true) as SVGSVGElement;
  // Plotly's handles for the mouse, and pictures of a zoom under way.
  copy.querySelectorAll('.draglayer, .zoomlayer, .hoverlayer, .crisp:empty').forEach((part) => part.remove());
  copy.removeAttribute('class');
  copy.setAttribute('x', String(place.left - box.left));
  copy.setAttribute('y', String(place.top - box.top));
  copy.setAttribute('width', String(place.width));
  copy.setAttribute('height', String(place.height));
  copy.style.removeProperty('background');
  return new XMLSerializer().serializeToString(copy);
}

async function rasterise(svg: string): Promise<Blob> {
  const image = new Image();
  image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg)}`;
  await image.decode();
  const canvas = document.createElement('canvas');
  canvas.width = image.naturalWidth * PNG_SCALE;
  canvas.height = image.naturalHeight * PNG_SCALE;
  const context = canvas.getContext('2d');
  if (!context) throw new Error('Cannot draw the picture: this browser gives no 2D canvas.');
  context.scale(PNG_SCALE, PNG_SCALE);
  context.drawImage(image, 0, 0);
  return new Promise((resolve, reject) => {
    const done = (blob: Blob | null) =>
      blob ? resolve(blob) : reject(new Error('Cannot draw the picture: the canvas came out empty.'));
    canvas.toBlob(done, 'image/png');
  });
}
