/**
 * Writes catalogs-demo/profiles/pump-week.csv: the quarter-hours of one week, each standing for 52 like it.
 * npm run tools && node dist/build/run-tool.js tests/catalogue/make-demo-profile.ts
 */
import { writeFileSync } from 'node:fs'
import { inventedProfile } from './invented-profile.ts'

const swing = { ambient: [12, 42], input: [44, 52] } as const
writeFileSync('catalogs-demo/profiles/pump-week.csv', inventedProfile(672, 13, 4, swing))
