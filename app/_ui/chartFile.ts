import { saveFile } from "./saveFile";

/** What of an element's style a picture needs to look the same outside the page. */
const STYLES = [
  "fill",
  "fill-opacity",
  "stroke",
  "stroke-width",
  "stroke-dasharray",
  "stroke-opacity",
  "opacity",
  "font-size",
  "font-family",
  "font-weight",
  "text-anchor",
] as const;

/** A drawing of the page as a file of its own: every style that it takes from the page written into it. */
export function drawingText(drawing: SVGSVGElement): string {
  const copy = drawing.cloneNode(true) as SVGSVGElement;
  const originals = [drawing, ...drawing.querySelectorAll<SVGElement>("*")];
  const copies = [copy, ...copy.querySelectorAll<SVGElement>("*")];
  for (const [i, element] of originals.entries()) {
    const style = getComputedStyle(element);
    const text = STYLES.map((name) => `${name}:${style.getPropertyValue(name)}`).join(";");
    copies[i]?.setAttribute("style", text);
    copies[i]?.removeAttribute("class");
  }
  const { width, height } = drawing.getBoundingClientRect();
  copy.setAttribute("xmlns", "http://www.w3.org/2000/svg");
  copy.setAttribute("width", String(Math.round(width)));
  copy.setAttribute("height", String(Math.round(height)));
  copy.style.background = getComputedStyle(document.body).backgroundColor;
  return new XMLSerializer().serializeToString(copy);
}

export function saveDrawing(name: string, drawing: SVGSVGElement): void {
  saveFile(`${name}.svg`, drawingText(drawing), "image/svg+xml");
}

/** How many dots of the picture each pixel of the page gets. */
const SHARPNESS = 2;

/** Saves a drawing as a PNG picture on the page's ground. */
export async function savePicture(name: string, drawing: SVGSVGElement): Promise<void> {
  const { width, height } = drawing.getBoundingClientRect();
  const image = new Image();
  image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(drawingText(drawing))}`;
  await image.decode();
  const canvas = document.createElement("canvas");
  canvas.width = Math.round(width * SHARPNESS);
  canvas.height = Math.round(height * SHARPNESS);
  const context = canvas.getContext("2d");
  if (!context) return;
  context.fillStyle = getComputedStyle(document.body).backgroundColor;
  context.fillRect(0, 0, canvas.width, canvas.height);
  context.drawImage(image, 0, 0, canvas.width, canvas.height);
  const link = document.createElement("a");
  link.href = canvas.toDataURL("image/png");
  link.download = `${name}.png`;
  link.click();
}
