/** What Vuetify's overlays and ECharts ask of a browser and the test DOM does not have. */
const missing = {
  visualViewport: Object.assign(new EventTarget(), {
    width: 1280,
    height: 800,
    offsetLeft: 0,
    offsetTop: 0,
    pageLeft: 0,
    pageTop: 0,
    scale: 1,
  }),
  ResizeObserver: class {
    observe(): void {}
    unobserve(): void {}
    disconnect(): void {}
  },
}

for (const [name, value] of Object.entries(missing)) {
  if (!Reflect.get(globalThis, name))
    Object.defineProperty(globalThis, name, { value, configurable: true, writable: true })
}
