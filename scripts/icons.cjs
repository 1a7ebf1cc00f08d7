/** assets/icon.svg -> the PNG sizes the manifest names. */
const { Resvg } = require('@resvg/resvg-js');

/** 16, 32, 80: the ribbon button; 64 and 128: the add-in's own picture and its double-density copy. */
const ICON_SIZES = [16, 32, 64, 80, 128];

function renderIcon(svg, size) {
  return Buffer.from(
    new Resvg(svg, { fitTo: { mode: 'width', value: size }, font: { loadSystemFonts: false } })
      .render()
      .asPng(),
  );
}

module.exports = { ICON_SIZES, renderIcon };
