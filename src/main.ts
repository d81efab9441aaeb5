import { createPinia } from 'pinia'
import { createApp } from 'vue'
import App from './App.vue'
import './assets/main.css'
import { setReactions } from './api/call-api.ts'
import { usePasswordPrompt } from './composables/usePasswordPrompt.ts'
import { createAppRouter } from './router/index.ts'
import { useSessionStore } from './stores/session.ts'

const app = createApp(App)
const pinia = createPinia()
app.use(pinia)

const session = useSessionStore(pinia)
const router = createAppRouter(app, session)
setReactions({
  askPassword: usePasswordPrompt().ask,
  signedOut: () => {
    session.forget()
    const at = router.currentRoute.value
    if (!at.meta.public) void router.push({ name: 'sign-in', query: { then: at.fullPath } })
  },
})

app.use(router)
await router.isReady().catch(() => undefined)
app.mount('#app')
