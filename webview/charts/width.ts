/** Calls back with an element's width in px now and whenever it changes, until it leaves the page. */
export function onWidth(element: Element, draw: (width: number) => void): void {
  let last = -1;
  const watch = new ResizeObserver(() => {
    if (!element.isConnected) {
      watch.disconnect();
      return;
    }
    const width = Math.round(element.getBoundingClientRect().width);
    if (width === last || width === 0) return;
    last = width;
    draw(width);
  });
  watch.observe(element);
}
