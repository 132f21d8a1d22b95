/**
 * Draws the picture of a run: `node dist/src/io/figures/writePicture.js RUN_DIR PICTURE.svg`. The picture of the
 * default night in the README is made by `npm run picture`.
 */
import { writeFileSync } from 'node:fs'
import { nightPicture } from './nightPicture.ts'
import { readNight } from './readNight.ts'

const [, , directory, picture] = process.argv
if (directory === undefined || picture === undefined)
  throw new Error('give a run directory and the name of the SVG file to write')
writeFileSync(picture, `${nightPicture(await readNight(directory))}\n`)
