import type { MetadataRoute } from 'next';

/** What a phone needs to keep Tercet on its home screen. Colours are those of the cellar mode: no white flash at the start. */
export default function manifest(): MetadataRoute.Manifest {
  return {
    id: '/',
    name: 'Tercet',
    short_name: 'Tercet',
    description: 'Blind tasting of barrel samples, from pull to call.',
    start_url: '/',
    scope: '/',
    display: 'standalone',
    background_color: '#060606',
    theme_color: '#060606',
    icons: [
      { src: '/icons/192.png', sizes: '192x192', type: 'image/png' },
      { src: '/icons/512.png', sizes: '512x512', type: 'image/png' },
      { src: '/icons/maskable-512.png', sizes: '512x512', type: 'image/png', purpose: 'maskable' },
    ],
  };
}
