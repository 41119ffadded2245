import sharp from 'sharp'

const xmp = '<?xpacket begin="" id="W5M0MpCehiHzreSzNTczkc9d"?><x:xmpmeta xmlns:x="adobe:ns:meta/"><rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#"><rdf:Description rdf:about="" xmlns:dc="http://purl.org/dc/elements/1.1/" dc:source="Hidden workshop"/></rdf:RDF></x:xmpmeta><?xpacket end="w"?>'

/** A picture as a phone lays it down: its left half red, its right half blue, turned a quarter by its EXIF, with place, make and owner beside it. */
export async function phonePicture(width = 2400, height = 1800): Promise<Buffer> {
  const blue = await sharp({ create: { width: Math.floor(width / 2), height, channels: 3, background: '#1030c0' } }).png().toBuffer()
  return sharp({ create: { width, height, channels: 3, background: '#c02010' } }).composite([{ input: blue, left: Math.ceil(width / 2), top: 0 }])
    .withXmp(xmp)
    .withExif({ IFD0: { Make: 'Tellingcamera', Artist: 'Hidden Person' }, IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 0/1', GPSLongitudeRef: 'W', GPSLongitude: '0/1 7/1 0/1' } })
    .withMetadata({ orientation: 6 }).jpeg().toBuffer()
}

/** A plain PNG. */
export const plainPicture = (colour = '#808080') => sharp({ create: { width: 800, height: 600, channels: 3, background: colour } }).png().toBuffer()

/** What a phone's own format begins with. */
export const heicHeader = Uint8Array.from([0, 0, 0, 24, ...new TextEncoder().encode('ftypheic'), 0, 0, 0, 0, ...new TextEncoder().encode('mif1heic')])

/** Traces of what a camera writes beside a picture, found in its bytes. */
export const tracesIn = (data: Uint8Array) => {
  const text = Buffer.from(data).toString('latin1')
  return ['Exif', 'EXIF', 'GPS', 'xmpmeta', 'XMP ', 'http://ns.adobe', 'Photoshop', 'Tellingcamera', 'Hidden Person', 'Hidden workshop'].filter(trace => text.includes(trace))
}
