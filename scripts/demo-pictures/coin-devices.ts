/** The picture on a side of a coin, in units of the coin's radius, the centre at (0, 0), y down. */
export interface Device {
  /** Filled shapes in high, domed relief. */
  readonly device: string;
  /** Filled shapes raised upon the device: wings, roofs, leaves. */
  readonly parts: string;
  /** Filled shapes as high as letters. */
  readonly details: string;
  /** Stroked lines as high as letters. */
  readonly lines: string;
  /** Stroked lines cut in: feathers, joints of masonry, veins. */
  readonly cuts: string;
}

const path = (d: string, attributes = ''): string => `<path d="${d}" ${attributes}/>`;

/** A blade of reed from its foot to its tip, thin and a little bent. */
function reed(footX: number, footY: number, tipX: number, tipY: number, width = 0.014): string {
  const bendX = footX + (tipX - footX) * 0.25;
  const bendY = (footY + tipY) / 2;
  return path(`M${footX - width / 2} ${footY}Q${bendX - width / 2} ${bendY} ${tipX} ${tipY}`
    + `Q${bendX + width / 2} ${bendY} ${footX + width / 2} ${footY}Z`);
}

const reedmace = (x: number, y: number, lean: number): string =>
  `<ellipse rx=".019" ry=".062" transform="translate(${x} ${y}) rotate(${lean})"/>`;

/** A heron among reeds, looking left over the water. */
export const heron: Device = {
  device:
    path('M-.22 .10C-.20-.06 .02-.14 .17-.02C.28 .07 .38 .20 .52 .335C.40 .335 .26 .35 .12 .31'
      + 'C-.04 .285-.20 .24-.22 .10Z')
    + path('M-.16 .235C-.34 .13-.36-.03-.245-.135C-.165-.21-.125-.27-.165-.355L-.245-.378'
      + 'L-.575-.365L-.25-.44C-.205-.50-.105-.505-.07-.445C-.03-.37-.045-.265-.115-.19'
      + 'C-.185-.115-.195-.055-.105 .005C-.03 .06-.06 .25-.16 .235Z'),
  parts:
    path('M-.09 .035C.01-.085 .15-.045 .235 .055C.33 .165 .41 .25 .49 .325C.35 .30 .17 .29 .06 .215'
      + 'C-.02 .165-.11 .10-.09 .035Z'),
  details:
    path('M-.13-.482C0-.515 .10-.47 .20-.365C.10-.43 .0-.455-.08-.445Z')
    // Plumes of the breast.
    + reed(-0.235, 0.13, -0.265, 0.32, 0.022) + reed(-0.205, 0.17, -0.215, 0.35, 0.022)
    + reed(-0.265, 0.09, -0.31, 0.26, 0.018)
    // Legs with their joints, and toes.
    + path('M.045 .28L.03 .60H.048L.072 .28ZM.155 .30L.16 .60H.178L.182 .30Z')
    + '<circle cx=".049" cy=".445" r=".019"/><circle cx=".169" cy=".455" r=".019"/>'
    + reed(0.04, 0.592, -0.05, 0.612, 0.016) + reed(0.04, 0.592, 0.105, 0.612, 0.016)
    + reed(0.17, 0.592, 0.09, 0.614, 0.016) + reed(0.17, 0.592, 0.24, 0.612, 0.016)
    + reed(-0.42, 0.6, -0.50, 0.06) + reed(-0.39, 0.6, -0.40, 0.10, 0.018)
    + reed(-0.36, 0.6, -0.30, 0.27) + reed(-0.45, 0.6, -0.57, 0.27) + reed(-0.34, 0.6, -0.35, 0.38)
    + reed(0.40, 0.6, 0.47, 0.14, 0.018) + reed(0.37, 0.6, 0.38, 0.39) + reed(0.43, 0.6, 0.57, 0.24)
    + reed(0.34, 0.6, 0.30, 0.43) + reed(0.46, 0.6, 0.60, 0.36)
    + reedmace(-0.462, 0.19, -8) + reedmace(0.449, 0.26, 10),
  lines: path('M-.52 .605H.54M-.30 .645H-.08M.02 .645H.34M-.16 .68H.06M.14 .68H.22'),
  cuts:
    path('M.02 .12C.12 .20 .24 .245 .37 .285M.04 .075C.14 .16 .26 .22 .41 .29'
      + 'M.08 .04C.18 .12 .28 .19 .43 .295M.13 .015C.21 .08 .31 .17 .45 .305'
      + 'M-.03 .115C.03 .18 .09 .215 .22 .25')
    + path('M-.04 .045C-.01 .075 .02 .08 .045 .06M.0 .01C.03 .04 .07 .045 .09 .025'
      + 'M-.06 .08C-.03 .11-.01 .125 .02 .125')
    + path('M-.54-.369L-.24-.408M-.27 .02C-.255-.03-.23-.07-.20-.10'
      + 'M-.225 .07C-.22 .0-.20-.03-.17-.07')
    + path('M-.12 .27C.04 .31 .2 .33 .34 .325', 'stroke-width=".008"')
    + '<circle cx="-.165" cy="-.447" r=".009" stroke-width=".014"/>',
};

const beam = (toX: number, toY: number, wide: number): string =>
  path(`M${toX > 0 ? 0.085 : -0.085}-.315L${toX} ${toY - wide}V${toY + wide}Z`);

function waves(rows: readonly (readonly [y: number, halfWidth: number, start: number])[]): string {
  return rows.map(([y, halfWidth, start]) => {
    let line = '';
    for (let x = -halfWidth + start; x + 0.14 <= halfWidth + 0.01; x += 0.15) {
      line += `M${x.toFixed(3)} ${y}q.035-.045 .075-.005q.035 .03 .065-.005`;
    }
    return path(line);
  }).join('');
}

/** A lighthouse on its rock, with beams and the sea. */
export const lighthouse: Device = {
  device:
    path('M-.135 .40L-.082-.185H.082L.135 .40Z')
    + path('M-.36 .47C-.33 .41-.27 .40-.24 .365C-.19 .36-.15 .39-.10 .40H.12'
      + 'C.17 .37 .21 .355 .25 .385C.28 .41 .34 .43 .37 .47Z'),
  parts:
    path('M-.118-.25H.118L.095-.185H-.095Z')
    + path('M-.07-.375H.07V-.25H-.07Z')
    + path('M-.10-.375C-.075-.435-.04-.475 0-.495C.04-.475 .075-.435 .10-.375Z')
    + path('M-.04 .40V.30A.04 .05 0 0 1 .04 .30V.40Z')
    + '<circle cx="0" cy="-.525" r=".022"/>',
  details: [[-0.52, -0.455, 0.012], [-0.61, -0.34, 0.014], [-0.63, -0.19, 0.013]]
    .map(([x = 0, y = 0, wide = 0]) => beam(x, y, wide) + beam(-x, y, wide)).join('')
    + [[-0.36, -0.49], [-0.45, -0.385], [-0.50, -0.265], [-0.44, -0.12]]
      .map(([x = 0, y = 0]) => beam(x, y, 0.004) + beam(-x, y, 0.004)).join(''),
  lines: path('M0-.54V-.61M-.135-.25V-.285H.135V-.25M-.08-.285V-.255M.08-.285V-.255')
    + waves([[0.51, 0.55, 0], [0.565, 0.48, 0.04], [0.62, 0.36, 0]]),
  cuts:
    Array.from({ length: 8 }, (_, at) => {
      const y = -0.13 + at * 0.068;
      const half = 0.085 + ((y + 0.185) / 0.585) * 0.05;
      return path(`M${-half} ${y}Q0 ${y + 0.025} ${half} ${y}`, 'stroke-width=".006"');
    }).join('')
    + path('M0-.115V-.075M0 .02V.06M0 .155V.195', 'stroke-width=".032"')
    + path('M-.035-.365V-.26M0-.365V-.26M.035-.365V-.26', 'stroke-width=".012"')
    + path('M-.06-.40C-.045-.435-.02-.46 0-.475M.06-.40C.045-.435 .02-.46 0-.475',
      'stroke-width=".006"')
    + path('M-.27 .45L-.22 .40M-.19 .46L-.16 .41M.20 .45L.23 .40M.28 .46L.26 .42'),
};

/** One ear of wheat along an arc, on the right; mirrored on the left. */
function wheatEar(side: 1 | -1): string {
  let grains = '';
  for (let at = 0; at < 7; at++) {
    const angle = side * (124 - at * 9.5);
    grains += `<g transform="rotate(${angle}) translate(0 -.53)">`
      + `<ellipse rx=".018" ry=".048" transform="translate(${-side * 0.02}-.032) rotate(${
        -side * 52})"/><ellipse rx=".018" ry=".048" transform="translate(${-side * 0.02} .032) `
      + `rotate(${-side * 128})"/></g>`;
  }
  return grains;
}

/** A storm lantern between two ears of wheat. */
export const lantern: Device = {
  device:
    path('M-.25-.235C-.20-.345-.10-.40 0-.42C.10-.40 .20-.345 .25-.235Z')
    + path('M.005-.135C.12 .02 .125 .12 0 .20C-.125 .12-.105 .02-.035-.035'
      + 'C-.015-.065-.0-.1 .005-.135Z'),
  parts:
    path('M-.205-.235H.205L.25 .27H-.25Z M-.155-.19L-.19 .225H.19L.155-.19Z', 'fill-rule="evenodd"')
    + path('M-.285 .27H.285V.33H-.285Z M-.23 .33H.23L.27 .41H-.27Z')
    + '<rect x="-.06" y="-.465" width=".12" height=".055" rx=".02"/>'
    + wheatEar(1) + wheatEar(-1),
  details: path('M-.06 .225L-.045 .18H.045L.06 .225Z')
    + '<circle cx="0" cy=".47" r=".02"/><circle cx="-.07" cy=".47" r=".012"/>'
    + '<circle cx=".07" cy=".47" r=".012"/>',
  lines: '<circle cx="0" cy="-.53" r=".062" stroke-width=".022"/>'
    + path('M.20 .52C.36 .46 .45 .36 .49 .24M-.20 .52C-.36 .46-.45 .36-.49 .24M-.44 .58H.44')
    + path('M.245-.02H.36M.235-.13L.345-.18M.255 .09L.365 .13M-.245-.02H-.36M-.235-.13L-.345-.18'
      + 'M-.255 .09L-.365 .13'),
  cuts: path('M-.17-.27C-.13-.33-.07-.37 0-.39M.17-.27C.13-.33 .07-.37 0-.39M0-.39V-.26')
    + path('M-.28 .30H.28M0-.03C.04 .04 .045 .10 0 .155')
    + path('M-.225-.20L-.225 .24M.225-.20L.225 .24', 'stroke-width=".006"'),
};

const leaf = 'M0 0C.048-.045 .042-.125 0-.18C-.042-.125-.048-.045 0 0Z';

/** Two branches tied below, open above. */
export const wreath: Device = (() => {
  let leaves = '';
  let veins = '';
  let berries = '';
  for (const side of [1, -1]) {
    for (let at = 0; at < 9; at++) {
      const place = `rotate(${side * (168 - at * 17)}) translate(0 -.665)`;
      for (const lean of [-31, 31]) {
        const turn = `${place} rotate(${-side * 90 + lean})`;
        leaves += path(leaf, `transform="${turn}"`);
        veins += path('M0-.025V-.145', `transform="${turn}" stroke-width=".009"`);
      }
      if (at % 2 === 1) {
        berries += `<circle r=".016" cx="${side * 0.03}" cy=".095" transform="${place}"/>`
          + `<circle r=".016" cx="${side * 0.03}" cy="-.095" transform="${place}"/>`;
      }
    }
  }
  return {
    device: '',
    parts: leaves + path('M0 .665C-.05 .58-.15 .60-.135 .66C-.13 .72-.05 .73 0 .665'
      + 'C.05 .73 .13 .72 .135 .66C.15 .60 .05 .58 0 .665Z')
      + '<circle cy=".665" r=".035"/>',
    details: berries + path('M-.02 .68L-.11 .80L-.065 .805L0 .70L.065 .805L.11 .80L.02 .68Z'),
    lines: path('M-.138 .65A.665 .665 0 0 1-.28-.603M.138 .65A.665 .665 0 0 0 .28-.603'),
    cuts: veins + '<circle cy=".665" r=".036" stroke-width=".008"/>',
  };
})();

/** Five-pointed stars near the rim, at these degrees clockwise from the top. */
export const starsAt = (...degrees: readonly number[]): string => degrees.map((angle) =>
  path('M0-.045L.013-.014H.045L.019 .006L.029 .038L0 .02L-.029 .038L-.019 .006L-.045-.014H-.013Z',
    `transform="rotate(${angle}) translate(0 -.815)"`)).join('');
