import '@/assets/fonts.css'
import '@/assets/tokens.css'
import '@/assets/base.css'
import { createApp } from 'vue'
import { createPinia } from 'pinia'
import App from '@/App.vue'
import { createBeadwrightVuetify } from '@/plugins/vuetify'
import { createBeadwrightRouter } from '@/router'
import { usePreferencesStore } from '@/stores/preferences'

const pinia = createPinia()
const app = createApp(App).use(pinia)
app
  .use(createBeadwrightVuetify(usePreferencesStore(pinia).theme))
  .use(createBeadwrightRouter())
  .mount('#app')
