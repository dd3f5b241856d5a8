import { z } from 'zod'

// The content policy allows no code made from text.
z.config({ jitless: true })
