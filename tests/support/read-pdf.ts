import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs'

export type ReadPage = { text: string; widthPt: number; heightPt: number }

/** The pages of a PDF as somebody else's program reads them: their text, one line a piece, and their size. */
export async function readPdf(bytes: Uint8Array): Promise<ReadPage[]> {
  const task = getDocument({ data: new Uint8Array(bytes), verbosity: 0 })
  const document = await task.promise
  const pages: ReadPage[] = []
  for (let number = 1; number <= document.numPages; number++) {
    const page = await document.getPage(number)
    const { items } = await page.getTextContent()
    const { width, height } = page.getViewport({ scale: 1 })
    const text = items.map((item) => ('str' in item ? `${item.str}${item.hasEOL ? '\n' : ''}` : '')).join('')
    pages.push({ text, widthPt: width, heightPt: height })
  }
  await task.destroy()
  return pages
}
