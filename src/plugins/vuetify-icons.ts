/** Own marks instead of an icon font: single paths on a 24 grid, drawn for this product. */
export const vuetifyIcons = {
  radioOff: 'svg:M12 3a9 9 0 1 0 0 18 9 9 0 0 0 0-18Zm0 1.4a7.6 7.6 0 1 1 0 15.2 7.6 7.6 0 0 1 0-15.2Z',
  radioOn: 'svg:M12 3a9 9 0 1 0 0 18 9 9 0 0 0 0-18Zm0 5.6a3.4 3.4 0 1 1 0 6.8 3.4 3.4 0 0 1 0-6.8Z',
  checkboxOff: 'svg:M4 4h16v16H4Zm1.4 1.4v13.2h13.2V5.4Z',
  checkboxOn: 'svg:M4 4h16v16H4Zm12.9 3.7-6.3 7.4-3.3-3.2-1.2 1.2 4.6 4.5L18.2 8.8Z',
  checkboxIndeterminate: 'svg:M4 4h16v16H4Zm3 7.2v1.6h10v-1.6Z',
  dropdown: 'svg:M7.2 9.6 12 14.4l4.8-4.8 1 1-5.8 5.8-5.8-5.8Z',
  expand: 'svg:M7.2 9.6 12 14.4l4.8-4.8 1 1-5.8 5.8-5.8-5.8Z',
  close: 'svg:m6 7 1-1 5 5 5-5 1 1-5 5 5 5-1 1-5-5-5 5-1-1 5-5Z',
  clear: 'svg:m6 7 1-1 5 5 5-5 1 1-5 5 5 5-1 1-5-5-5 5-1-1 5-5Z',
  prev: 'svg:M14.4 7.2 9.6 12l4.8 4.8-1 1L7.6 12l5.8-5.8Z',
  next: 'svg:M9.6 7.2 14.4 12l-4.8 4.8 1 1 5.8-5.8-5.8-5.8Z',
}
