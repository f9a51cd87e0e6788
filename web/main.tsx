import '@fontsource-variable/atkinson-hyperlegible-mono/wght.css'
import '@fontsource-variable/atkinson-hyperlegible-next/wght.css'
import './app/theme.css'
import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { RouterProvider } from 'react-router-dom'
import { openWithoutLine } from './app/open-without-line.ts'
import { createAppQueryClient, Providers } from './app/providers.tsx'
import { createRouter } from './app/router.tsx'
import { currentLight, showLight } from './lib/light.ts'

const root = document.getElementById('root')
if (!root) throw new Error('index.html has lost its root element')

showLight(currentLight())
void openWithoutLine()
createRoot(root).render(
  <StrictMode>
    <Providers client={createAppQueryClient()}>
      <RouterProvider router={createRouter()} />
    </Providers>
  </StrictMode>,
)
