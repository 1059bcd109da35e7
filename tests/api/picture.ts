import sharp from 'sharp';

/** A picture with a place written into it, as a phone writes it: 54° 12′ N, 2° 18′ W. */
export async function picture(format: 'jpeg' | 'png' | 'webp' = 'jpeg', width = 640): Promise<Uint8Array> {
  const made = sharp({ create: { width, height: 480, channels: 3, background: '#8a5c22' } }).withExif({
    IFD0: { Make: 'Camera of Larkmoor', Copyright: 'Larkmoor' },
    IFD3: {
      GPSLatitudeRef: 'N',
      GPSLatitude: '54/1 12/1 0/1',
      GPSLongitudeRef: 'W',
      GPSLongitude: '2/1 18/1 0/1',
    },
  });
  return made.toFormat(format).toBuffer();
}
