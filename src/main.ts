import '@/assets/fonts.css'
import '@/assets/tokens.css'
import '@/assets/base.css'
import { createApp } from 'vue'
import { createPinia } from 'pinia'
import { z } from 'zod'
import App from '@/App.vue'
import { createBeadwrightVuetify } from '@/plugins/vuetify'
import { createBeadwrightRouter } from '@/router'
import { usePreferencesStore } from '@/stores/preferences'

// The content policy allows no code made from text.
z.config({ jitless: true })

const pinia = createPinia()
const app = createApp(App).use(pinia)
app
  .use(createBeadwrightVuetify(usePreferencesStore(pinia).theme))
  .use(createBeadwrightRouter())
  .mount('#app')
