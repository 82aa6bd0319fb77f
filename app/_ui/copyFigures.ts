/**
 * The text of a copied selection with every figure in all its digits, table cells parted by tabs; null when the selection
 * holds no figure.
 */
export function copiedText(selection: Selection): string | null {
  if (selection.rangeCount === 0 || selection.isCollapsed) return null;
  const range = selection.getRangeAt(0);
  const around = range.commonAncestorContainer;
  const element = around instanceof Element ? around : around.parentElement;
  const inside = element?.closest<HTMLElement>("[data-full]");
  if (inside) return inside.dataset.full ?? null;
  const part = range.cloneContents();
  const figures = part.querySelectorAll<HTMLElement>("[data-full]");
  if (figures.length === 0) return null;
  for (const figure of figures) figure.textContent = figure.dataset.full ?? "";
  const rows = [...part.querySelectorAll("tr")];
  if (rows.length === 0) return part.textContent;
  const cells = (row: Element) => [...row.children].map((cell) => cell.textContent?.trim() ?? "");
  return rows.map((row) => cells(row).join("\t")).join("\n");
}
