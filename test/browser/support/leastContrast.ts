/**
 * Expression for the page: the text that stands out least from its ground, by the contrast ratio of
 * WCAG 2.2 (relative luminance of sRGB).
 */
export const leastContrast = `(() => {
  const channels = (colour) => colour.match(/[\\d.]+/g).map(Number);
  const luminance = (colour) => {
    const [r, g, b] = channels(colour).map((value) => {
      const share = value / 255;
      return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
    });
    return 0.2126 * r + 0.7152 * g + 0.0722 * b;
  };
  const ground = (element) => {
    for (let at = element; at; at = at.parentElement) {
      const colour = getComputedStyle(at).backgroundColor;
      if (channels(colour)[3] !== 0) return colour;
    }
    return 'rgb(255, 255, 255)';
  };
  let least = { ratio: 21, text: '' };
  for (const element of document.querySelectorAll('body *')) {
    const own = [...element.childNodes].some((node) => node.nodeType === 3 && node.data.trim() !== '');
    if (!own || element.closest('title, desc, .skip')) continue;
    const style = getComputedStyle(element);
    const ink = element instanceof SVGElement ? style.fill : style.color;
    const [a, b] = [luminance(ink), luminance(ground(element))].sort((x, y) => y - x);
    const ratio = (a + 0.05) / (b + 0.05);
    if (ratio < least.ratio) least = { ratio, text: element.textContent.slice(0, 60) };
  }
  return least;
})()`;
