import { lazy, Suspense } from 'react'
import { Link } from '../../components/link.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { paths } from '../../paths.ts'

const LiveSky = lazy(async () => ({ default: (await import('./live-sky.tsx')).LiveSky }))

/** The whole sky, alive: the way into the atlas. */
export function SkyInvitation() {
  return (
    <Sheet
      title="The sky, supergalactic frame"
      actions={
        <>
          <Link to={paths.sky}>Open the sky</Link>
          <Link to={paths.plane}>Open the plane</Link>
        </>
      }
    >
      {/* The map is twice as wide as high: its room is kept while it comes. */}
      <div className="aspect-[2/1]">
        <Suspense fallback={null}>
          <LiveSky />
        </Suspense>
      </div>
    </Sheet>
  )
}
