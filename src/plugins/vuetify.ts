import 'vuetify/styles/core'
import '@/assets/vuetify.css'
import { createVuetify, type ThemeDefinition } from 'vuetify'
import { vuetifyDefaults } from './vuetify-defaults'
import { vuetifyIcons } from './vuetify-icons'
import { darkTokens, lightTokens, type ThemeTokens } from './theme-tokens'

/** Inks are colours of their own, not alphas; nothing casts a shadow. */
const variables = {
  'border-opacity': 1,
  'high-emphasis-opacity': 1,
  'medium-emphasis-opacity': 1,
  'disabled-opacity': 1,
  'hover-opacity': 0.06,
  'focus-opacity': 0,
  'selected-opacity': 0,
  'activated-opacity': 0,
  'pressed-opacity': 0.1,
  'shadow-key-opacity': 0,
  'shadow-ambient-opacity': 0,
  'elevation-overlay-opacity-step': '0%',
  'highlight-opacity': '8%',
}

const theme = (dark: boolean, token: ThemeTokens): ThemeDefinition => ({
  dark,
  colors: {
    background: token.ground,
    'on-background': token.ink,
    surface: token.surface,
    'on-surface': token.ink,
    'surface-bright': token.surface,
    'on-surface-bright': token.ink,
    'surface-light': token.sunken,
    'on-surface-light': token.ink,
    'surface-variant': token.ink,
    'on-surface-variant': token.ground,
    primary: token.action,
    'on-primary': token.onAction,
    secondary: token.ink2,
    'on-secondary': token.ground,
    warning: token.attention,
    'on-warning': token.onAttention,
    success: token.positive,
    'on-success': token.ground,
    error: token.danger,
    'on-error': token.onDanger,
    info: token.ink2,
    'on-info': token.ground,
    ink2: token.ink2,
    ink3: token.ink3,
    rule: token.rule,
    edge: token.edge,
    sunken: token.sunken,
    measured: token.data,
    derived: token.model,
    band: token.band,
  },
  variables: {
    ...variables,
    'border-color': token.rule,
    'shadow-color': '#000000',
    'theme-kbd': token.surface,
    'theme-on-kbd': token.ink,
    'theme-code': token.surface,
    'theme-on-code': token.ink,
  },
})

export type ThemeName = 'light' | 'dark'

/** The component library with our theme, defaults, marks and widths. */
export const createBeadwrightVuetify = (initial: ThemeName = 'light') =>
  createVuetify({
    theme: {
      defaultTheme: initial,
      themes: { light: theme(false, lightTokens), dark: theme(true, darkTokens) },
      variations: false,
    },
    defaults: vuetifyDefaults,
    icons: { defaultSet: 'svg', aliases: vuetifyIcons },
    display: {
      mobileBreakpoint: 600,
      thresholds: { xs: 0, sm: 600, md: 1100, lg: 1280, xl: 1920, xxl: 2560 },
    },
  })
