import { defineConfig } from 'vitest/config'

/** The slower checks, one after the other, each a script of its own; their tables go straight to the terminal. */
export default defineConfig({
  test: {
    include: ['test/campaigns/**/*.campaign.ts'],
    testTimeout: 3_600_000,
    hookTimeout: 3_600_000,
    fileParallelism: false,
    disableConsoleIntercept: true,
    reporters: ['verbose'],
  },
})
