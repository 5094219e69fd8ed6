import { gzipSync } from 'node:zlib'

/** Scripts that a page's HTML loads at first view, with everything that it preloads, gzipped; bytes. */
export async function scriptBytesGzip(pageUrl: string): Promise<number> {
  const html = await (await fetch(pageUrl)).text()
  const sources = new Set<string>()
  for (const [tag] of html.matchAll(/<(?:script|link)\b[^>]*>/g)) {
    const isScript = tag.startsWith('<script') || /rel="modulepreload"/.test(tag) || (/rel="preload"/.test(tag) && /as="script"/.test(tag))
    const address = /(?:src|href)="([^"]+\.js)"/.exec(tag)?.[1]
    if (isScript && address) sources.add(new URL(address, pageUrl).href)
  }
  let bytes = 0
  for (const source of sources) bytes += gzipSync(Buffer.from(await (await fetch(source, { headers: { 'accept-encoding': 'identity' } })).arrayBuffer())).length
  return bytes
}

async function timeOnce(url: string): Promise<number> {
  const start = performance.now()
  await (await fetch(url)).arrayBuffer()
  return performance.now() - start
}

/** Median time of a page on two servers, asked in turn so that other load meets both alike; ms. */
export async function medianTimesMs(first: string, second: string, rounds: number): Promise<[number, number]> {
  const times: [number[], number[]] = [[], []]
  for (let round = 0; round < rounds; round += 1) {
    times[0].push(await timeOnce(first))
    times[1].push(await timeOnce(second))
  }
  const median = (list: number[]) => list.sort((a, b) => a - b)[Math.floor(list.length / 2)] ?? Number.NaN
  return [median(times[0]), median(times[1])]
}
