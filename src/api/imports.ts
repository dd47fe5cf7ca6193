/** Batch entry: upload, mapping, rows, and the draft that comes of it. */
import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { importDraftAnswerSchema, importListSchema, importRowsSchema, importSchema, type Mapping } from '../../core/schema/imports.ts'
import { getJson, sendJson } from './client.ts'
import { keys } from './keys.ts'

const address = (id: number | string, part = ''): string => `/api/imports/${id}${part}`

export function useImports(enabled = true) {
  return useQuery({ queryKey: keys.imports.list(), queryFn: ({ signal }) => getJson('/api/imports', importListSchema, { signal }), enabled })
}

export function useImport(id: number | string) {
  return useQuery({ queryKey: keys.imports.one(id), queryFn: ({ signal }) => getJson(address(id), importSchema, { signal }) })
}

export type RowsShown = 'all' | 'ok' | 'bad'

export function useImportRows(id: number | string, only: RowsShown, offset: number, limit = 100) {
  return useQuery({
    queryKey: keys.imports.part(id, 'rows', { only, offset, limit }),
    queryFn: ({ signal }) => getJson(address(id, '/rows'), importRowsSchema, { query: { only, offset, limit }, signal }),
    placeholderData: keepPreviousData,
  })
}

export function useUpload() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (file: File) => {
      const form = new FormData()
      form.append('file', file)
      return sendJson('POST', '/api/imports', form, importSchema)
    },
    onSuccess: (answer) => {
      client.setQueryData(keys.imports.one(String(answer.id)), answer)
      void client.invalidateQueries({ queryKey: keys.imports.list() })
    },
  })
}

function useRefresh(id: number | string) {
  const client = useQueryClient()
  return () => client.invalidateQueries({ queryKey: ['imports', 'one', id] })
}

export function usePatchMapping(id: number | string) {
  const refresh = useRefresh(id)
  return useMutation({ mutationFn: (mapping: Mapping) => sendJson('PATCH', address(id), { mapping }, importSchema), onSuccess: refresh })
}

export function usePatchRow(id: number | string) {
  const refresh = useRefresh(id)
  return useMutation({
    mutationFn: ({ number, ...body }: { number: number; cells?: string[]; leftOut?: string | null }) =>
      sendJson('PATCH', address(id, `/rows/${number}`), body, importSchema),
    onSuccess: refresh,
  })
}

export function useMakeDraft(id: number | string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (body: { title: string; summary?: string }) => sendJson('POST', address(id, '/draft'), body, importDraftAnswerSchema),
    onSuccess: async () => {
      await client.invalidateQueries({ queryKey: keys.imports.all })
      await client.invalidateQueries({ queryKey: keys.submissions.all })
    },
  })
}
