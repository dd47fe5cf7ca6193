import { Link } from '../../components/link.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { paths } from '../../paths.ts'

/** The way into the atlas. */
export function SkyInvitation() {
  return (
    <Sheet title="The sky and the plane">
      <p className="prose-measure">Every galaxy of the catalogue on the whole sky, in equatorial, galactic or supergalactic frame, and in three dimensions round the supergalactic plane.</p>
      <p className="mt-4 flex flex-wrap gap-3">
        <Link look="primary" to={paths.sky}>
          Open the sky
        </Link>
        <Link look="button" to={paths.plane}>
          Open the plane
        </Link>
      </p>
    </Sheet>
  )
}
