/** Kept figures, and drawing one on the server. */
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { figureListSchema, figureSchema, type FigureFormat, type FigureInput } from '../../core/schema/figures.ts'
import { getJson, postForBlob, sendJson } from './client.ts'
import { keys } from './keys.ts'

export function useFigures() {
  return useQuery({ queryKey: keys.figures.list(), queryFn: ({ signal }) => getJson('/api/figures', figureListSchema, { signal }) })
}

export function useFigure(id: number | string) {
  return useQuery({ queryKey: keys.figures.one(id), queryFn: ({ signal }) => getJson(`/api/figures/${id}`, figureSchema, { signal }) })
}

export function useKeepFigure() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: ({ id, ...body }: FigureInput & { id?: number }) =>
      id === undefined ? sendJson('POST', '/api/figures', body, figureSchema) : sendJson('PATCH', `/api/figures/${id}`, body, figureSchema),
    onSuccess: () => client.invalidateQueries({ queryKey: keys.figures.all }),
  })
}

export function useDeleteFigure() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (id: number) => sendJson('DELETE', `/api/figures/${id}`, undefined, null),
    // Not the figure itself: its page may still be open for a moment, and would ask for what is gone.
    onSuccess: () => client.invalidateQueries({ queryKey: keys.figures.list() }),
  })
}

/** Draws a recipe on the server. @returns the file and the name it should have */
export function useRenderFigure() {
  return useMutation({ mutationFn: (body: { recipe: unknown; format: FigureFormat }) => postForBlob('/api/figures/render', body) })
}
