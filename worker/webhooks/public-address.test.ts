import { expect, it } from 'vitest'
import { isPublicAddress } from './public-address.ts'

// IANA's registries of special-purpose addresses, IPv4 and IPv6, as of RFC 6890 and its updates (from memory).
it.each([
  '127.0.0.1',
  '10.1.2.3',
  '172.16.0.1',
  '172.31.255.255',
  '192.168.1.1',
  '169.254.169.254',
  '100.64.0.1',
  '0.0.0.0',
  '224.0.0.1',
  '255.255.255.255',
  '::',
  '::1',
  '::ffff:10.0.0.1',
  'fe80::1',
  'fd00::1',
  'ff02::1',
  '64:ff9b::a00:1',
  '2002:a00:1::',
  '2001:db8::1',
  'data.example',
  '',
])('%j is no address of the open network', (address) => {
  expect(isPublicAddress(address)).toBe(false)
})

it.each(['8.8.8.8', '172.32.0.1', '192.167.255.255', '223.255.255.255', '2606:4700::1111', '2a00:1450:4001::1'])(
  '%s is',
  (address) => {
    expect(isPublicAddress(address)).toBe(true)
  },
)
