import { act, render, screen } from '@testing-library/react'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import { expect, test, vi } from 'vitest'
import { onDemand } from '../../web/app/on-demand.tsx'

const ThreeSheets = () => <p>three sheets</p>

test('a page that cannot be fetched says so under the folio, and opens by itself when the line is back', async () => {
  const online = vi.spyOn(navigator, 'onLine', 'get').mockReturnValue(false)
  const load = async () => {
    if (!navigator.onLine) throw new TypeError('Failed to fetch dynamically imported module')
    return { Component: ThreeSheets }
  }
  const router = createMemoryRouter([
    { element: <p>the folio</p>, path: '/' },
    { path: '/sheets', lazy: onDemand(load) },
  ])
  render(<RouterProvider router={router} />)
  await act(() => router.navigate('/sheets'))
  expect(screen.getByRole('status').textContent).toContain('It opens by itself when the line is back.')

  online.mockReturnValue(true)
  act(() => void window.dispatchEvent(new Event('online')))
  expect(await screen.findByText('three sheets')).toBeDefined()
})
