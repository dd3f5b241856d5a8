/** Colours of the maps, equal steps of lightness from end to end, by theme. */
export interface MapRamps {
  /** Density: from the plot ground to the darkest (in the dark theme the palest) ink. */
  readonly density: readonly string[]
  /** Coupling: rarer than independent, the ground in the middle, more frequent. */
  readonly coupling: readonly string[]
}

const densityLight = [
  '#FDFBF7', '#F9F7F1', '#EDF4FA', '#E7F1F8', '#E1EDF7', '#DCEAF5', '#D6E6F4', '#D0E2F3',
  '#CADFF1', '#C5DBF0', '#BFD7EF', '#BAD3EE', '#B4D0EC', '#AFCCEB', '#AAC8EA', '#A5C4E8',
  '#A1C0E6', '#9CBCE5', '#98B8E3', '#94B4E1', '#90B0DF', '#8CACDC', '#89A8DA', '#85A4D7',
  '#82A0D5', '#7F9CD2', '#7C98CF', '#7994CB', '#7790C8', '#748CC5', '#7288C1', '#6F84BD',
  '#6D80B9', '#6B7CB5', '#6878B1', '#6674AC', '#6471A8', '#626DA3', '#60699F', '#5E669A',
  '#5B6295', '#595F90', '#575B8B', '#555886', '#535481', '#50517C', '#4E4E77', '#4B4B73',
  '#49476E', '#474469', '#444164', '#423E5F', '#3F3B5A', '#3C3856', '#3A3551', '#37324D',
  '#342F48', '#322C44', '#2F2A40', '#2C273C', '#2A2438', '#272135', '#241E31', '#221B2E',
] as const

const densityDark = [
  '#201E23', '#222128', '#25232D', '#282532', '#2A2737', '#2D2A3C', '#302C41', '#322F46',
  '#34314B', '#373450', '#393655', '#3B395A', '#3E3C5F', '#403F64', '#424268', '#44446D',
  '#464772', '#484B77', '#4A4E7B', '#4C5180', '#4E5485', '#4F5789', '#515B8D', '#535E92',
  '#556196', '#57659A', '#59689E', '#5B6CA2', '#5D6FA5', '#5F73A9', '#6177AC', '#637AB0',
  '#657EB3', '#6782B6', '#6A85B9', '#6C89BC', '#6F8DBF', '#7191C2', '#7494C4', '#7798C7',
  '#7A9CC9', '#7DA0CC', '#81A3CE', '#84A7D0', '#88ABD2', '#8CAED4', '#8FB2D6', '#93B6D8',
  '#97B9DA', '#9CBDDC', '#A0C1DE', '#A4C4E0', '#A9C8E2', '#ADCBE3', '#B2CFE5', '#B7D2E7',
  '#BCD6E9', '#C0D9EB', '#C5DDED', '#CAE0EF', '#CFE4F1', '#D4E7F3', '#D9EBF5', '#DDEEF8',
] as const

const couplingLight = [
  '#2A4D90', '#2F5293', '#355797', '#3B5C9B', '#40619F', '#4666A2', '#4C6CA6', '#5271AA',
  '#5876AE', '#5D7BB1', '#6380B5', '#6985B9', '#6F8BBC', '#7690C0', '#7C95C3', '#829BC7',
  '#88A0CA', '#8EA5CE', '#95AAD1', '#9BB0D5', '#A2B5D8', '#A8BBDB', '#AFC0DF', '#B5C5E2',
  '#BCCBE5', '#C3D0E8', '#C9D6EC', '#D0DBEF', '#D7E1F2', '#DEE6F4', '#E5ECF7', '#EDF1F9',
  '#F8F7F2', '#F8EFE9', '#F5E9E1', '#F1E3D9', '#EEDDD0', '#EAD6C8', '#E7D0C0', '#E3CAB9',
  '#DFC4B1', '#DBBEA9', '#D8B8A2', '#D4B29A', '#D0AC93', '#CCA78B', '#C8A184', '#C49B7C',
  '#C09575', '#BC8F6E', '#B88A67', '#B4845F', '#B07E58', '#AC7851', '#A8734A', '#A36D42',
  '#9F683B', '#9B6233', '#975C2B', '#935723', '#8F5119', '#8A4C0D', '#864600', '#7F4200',
  '#783F00',
] as const

const couplingDark = [
  '#A4C5FF', '#9CBFFF', '#93B9FF', '#8EB4FA', '#8AAFF2', '#86A9EA', '#82A4E3', '#7E9FDB',
  '#7A9AD4', '#7694CC', '#728FC5', '#6E8ABD', '#6A85B6', '#6680AF', '#627BA7', '#5F76A0',
  '#5B7199', '#576C92', '#54678B', '#506284', '#4D5E7D', '#495976', '#46546F', '#425068',
  '#3F4B61', '#3B465A', '#384254', '#353D4D', '#323946', '#2F353F', '#2B3039', '#292C32',
  '#292724', '#312A26', '#372E28', '#3D322A', '#43362C', '#493A2E', '#4F3D30', '#554133',
  '#5C4535', '#624937', '#684E39', '#6F523C', '#75563E', '#7C5A41', '#825E43', '#896346',
  '#8F6748', '#966B4B', '#9C704D', '#A37450', '#AA7953', '#B17D55', '#B78258', '#BE865B',
  '#C58B5E', '#CC8F60', '#D39463', '#DA9966', '#E19D69', '#E8A26C', '#EFA76F', '#F6AC72',
  '#FEB175',
] as const

export const MAP_RAMPS: Readonly<Record<'light' | 'dark', MapRamps>> = {
  light: { density: densityLight, coupling: couplingLight },
  dark: { density: densityDark, coupling: couplingDark },
}
