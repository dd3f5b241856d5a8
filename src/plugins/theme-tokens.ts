/** The tokens of assets/tokens.css that the component library needs as plain colours; a test holds the two together. */
export interface ThemeTokens {
  readonly ground: string
  readonly surface: string
  readonly sunken: string
  readonly ink: string
  readonly ink2: string
  readonly ink3: string
  readonly rule: string
  readonly edge: string
  readonly action: string
  readonly onAction: string
  readonly attention: string
  readonly onAttention: string
  readonly positive: string
  readonly danger: string
  readonly onDanger: string
  readonly data: string
  readonly model: string
  readonly band: string
}

export const lightTokens: ThemeTokens = {
  ground: '#F8F5EE',
  surface: '#FDFCF7',
  sunken: '#F0ECE3',
  ink: '#241E18',
  ink2: '#554F46',
  ink3: '#6F685F',
  rule: '#D8D3C9',
  edge: '#867F74',
  action: '#005B63',
  onAction: '#FCFAF6',
  attention: '#9A4825',
  onAttention: '#FCFAF6',
  positive: '#3B6436',
  danger: '#911735',
  onDanger: '#FCFAF6',
  data: '#D3CDC2',
  model: '#2B3F82',
  band: '#C7D2EE',
}

export const darkTokens: ThemeTokens = {
  ground: '#1A1713',
  surface: '#221E1A',
  sunken: '#13100D',
  ink: '#EAE6DD',
  ink2: '#B5B0A7',
  ink3: '#9A958C',
  rule: '#3A3631',
  edge: '#79746B',
  action: '#79CBCB',
  onAction: '#0A191A',
  attention: '#ECA069',
  onAttention: '#1F150F',
  positive: '#98CA92',
  danger: '#F58A92',
  onDanger: '#1F1314',
  data: '#4B4741',
  model: '#A2B9F5',
  band: '#374465',
}
