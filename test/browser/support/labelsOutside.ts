/** Expression for the page: texts of plots that reach beyond the plot they belong to, by more than a pixel. */
export const labelsOutside = `[...document.querySelectorAll('figure > svg')]
  .filter((svg) => svg.getBoundingClientRect().width > 0)
  .flatMap((svg) => {
    const plot = svg.getBoundingClientRect();
    return [...svg.querySelectorAll('text')].filter((text) => {
      const box = text.getBoundingClientRect();
      return box.left < plot.left - 1 || box.right > plot.right + 1
        || box.top < plot.top - 1 || box.bottom > plot.bottom + 1;
    });
  })
  .map((text) => text.textContent)`;
