import sharp from 'sharp'

/** Grey levels, 0 to 255. */
export async function grey(image: Buffer): Promise<{ data: Buffer; width: number; height: number }> {
  const { data, info } = await sharp(image).flatten({ background: '#ffffff' }).greyscale().raw().toBuffer({ resolveWithObject: true })
  return { data, width: info.width, height: info.height }
}

/** The height of a figure is seldom a whole number of pixels. */
const SPARE_ROWS = 1

/** Side of the squares that pictures are compared in, px: about a short name. */
const SQUARE = 24
/**
 * Difference of grey levels, blurred a little so that a seam of antialiasing does not count as a moved mark: the mean of the whole, and of the
 * square where it is worst.
 */
export async function difference(a: Buffer, b: Buffer): Promise<{ mean: number; worst: number }> {
  const soft = async (image: Buffer): ReturnType<typeof grey> => grey(await sharp(image).flatten({ background: '#ffffff' }).blur(1.2).png().toBuffer())
  const [one, other] = await Promise.all([soft(a), soft(b)])
  if (other.width !== one.width || Math.abs(other.height - one.height) > SPARE_ROWS) throw new Error(`${other.width} × ${other.height} px beside ${one.width} × ${one.height}`)
  let sum = 0
  const rows = Math.min(one.height, other.height)
  const across = Math.ceil(one.width / SQUARE)
  const squares = new Float64Array(across * Math.ceil(rows / SQUARE))
  for (let y = 0; y < rows; y += 1) {
    for (let x = 0; x < one.width; x += 1) {
      const apart = Math.abs((one.data[y * one.width + x] ?? 0) - (other.data[y * one.width + x] ?? 0))
      const square = Math.floor(y / SQUARE) * across + Math.floor(x / SQUARE)
      sum += apart
      squares[square] = (squares[square] ?? 0) + apart
    }
  }
  return { mean: sum / (one.width * rows), worst: Math.max(...squares) / SQUARE ** 2 }
}
