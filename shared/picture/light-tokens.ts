/**
 * The light tokens of assets/tokens.css that a picture is drawn in: it leaves the page, so it cannot ask for CSS variables,
 * and it is light whatever the theme on screen. A test holds the two together.
 */
export const lightTokens = {
  ground: '#F8F5EE',
  surface: '#FDFCF7',
  ink: '#241E18',
  ink2: '#554F46',
  ink3: '#6F685F',
  rule: '#D8D3C9',
  edge: '#867F74',
  plotGround: '#FDFCF7',
  plotAxis: '#554F46',
  plotGrid: '#E6E2DC',
  data: '#D3CDC2',
  dataEdge: '#867F74',
  model: '#2B3F82',
  band: '#C7D2EE',
  raw: '#6F685F',
  plain: '#79736C',
} as const
