import { ImageRun, Paragraph } from 'docx'

/** A drawing as outlines and as PNG, with its words. Sizes as placed, CSS px of 1/96 inch. */
export interface Picture {
  svg: string
  png: Uint8Array
  width: number
  height: number
  title: string
  /** What it shows: the text equivalent. */
  description: string
}

/**
 * A picture in a line of its own, kept with its caption. `id` is the drawing's number in the
 * document: given, because a counter of the process would change the bytes from run to run.
 */
export function pictureLine(picture: Picture, id: number): Paragraph {
  const { svg, png, width, height, title, description } = picture
  const transformation = { width, height }
  return new Paragraph({
    style: 'PictureLine',
    children: [
      new ImageRun({
        type: 'svg',
        data: new TextEncoder().encode(svg),
        transformation,
        fallback: { type: 'png', data: png },
        altText: { id: String(id), name: title, title, description },
      }),
    ],
  })
}

export function pictureCaption(text: string): Paragraph {
  return new Paragraph({ style: 'PictureCaption', text })
}
