import { useState } from 'react'
import { zodResolver } from '@hookform/resolvers/zod'
import { Controller, useForm } from 'react-hook-form'
import { z } from 'zod'
import { sourceInputSchema, type Source, type SourceForm } from '../../core/schema/sources.ts'
import { fieldError } from '../api/client.ts'
import { useCreateSource } from '../api/sources.ts'
import { Button } from './button.tsx'
import { Dialog } from './dialog.tsx'
import { ProblemNote } from './failed-state.tsx'
import { TextArea } from './text-area.tsx'
import { TextField } from './text-field.tsx'

/** What a person types: authors line by line, the year as text, empty fields for none. */
const formSchema = z
  .object({ title: z.string(), authors: z.string(), year: z.string(), venue: z.string(), bibcode: z.string(), doi: z.string() })
  .transform((typed): SourceForm => ({
    title: typed.title,
    authors: typed.authors.split(/\n|;/).map((a) => a.trim()).filter((a) => a !== ''),
    year: /^\d{4}$/.test(typed.year.trim()) ? Number(typed.year) : NaN,
    venue: typed.venue,
    kind: 'article' as const,
    url: null,
    bibcode: typed.bibcode.trim() || null,
    doi: typed.doi.trim().replace(/^(https?:\/\/(dx\.)?doi\.org\/|doi:\s*)/i, '') || null,
  }))
  .pipe(sourceInputSchema)

const BLANK = { title: '', authors: '', year: '', venue: '', bibcode: '', doi: '' }

export interface SourceDialogProps {
  isOpen: boolean
  onOpenChange: (isOpen: boolean) => void
  onMade: (source: Source) => void
}

/** Adds a source. What was typed stays until it has been taken. */
export function SourceDialog({ isOpen, onOpenChange, onMade }: SourceDialogProps) {
  const create = useCreateSource()
  const form = useForm<z.input<typeof formSchema>, unknown, z.output<typeof formSchema>>({ resolver: zodResolver(formSchema), defaultValues: BLANK })
  const [sent, setSent] = useState(0)
  const save = form.handleSubmit((body) => {
    setSent((n) => n + 1)
    create.mutate(body, {
      onSuccess: (source) => {
        form.reset(BLANK)
        onOpenChange(false)
        onMade(source)
      },
    })
  })
  const field = (name: keyof typeof BLANK, label: string, extra: { help?: string; mono?: boolean } = {}) => (
    <Controller
      control={form.control}
      name={name}
      render={({ field: f, fieldState }) => {
        const error = fieldState.error?.message ?? (sent > 0 ? fieldError(create.error, name) : undefined)
        const props = { label, value: f.value, onChange: f.onChange, onBlur: f.onBlur, error, ...extra }
        return name === 'authors' ? <TextArea rows={3} {...props} /> : <TextField {...props} />
      }}
    />
  )
  return (
    <Dialog
      title="Add a source"
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      footer={
        <>
          <Button onPress={() => onOpenChange(false)}>Cancel</Button>
          <Button kind="primary" onPress={() => void save()} isPending={create.isPending}>Add</Button>
        </>
      }
    >
      <form
        className="grid gap-4"
        onSubmit={(event) => {
          event.preventDefault()
          void save()
        }}
      >
        {field('title', 'Title')}
        {field('authors', 'Authors', { help: 'One a line, surname first: Gieren, W.' })}
        <div className="grid gap-4 sm:grid-cols-[7rem_1fr]">
          {field('year', 'Year')}
          {field('venue', 'Published in', { help: 'Journal, volume and page: ApJ 628, 695' })}
        </div>
        {field('bibcode', 'Bibcode', { mono: true, help: '19 characters; leave empty if there is none' })}
        {field('doi', 'DOI', { mono: true })}
        {create.isError && <ProblemNote error={create.error} />}
        <button type="submit" hidden />
      </form>
    </Dialog>
  )
}
