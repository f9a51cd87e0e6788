/** Which addresses a webhook may go to: the open network only, so that nobody can make the worker knock inside ours. */
import { lookup as resolve } from 'node:dns/promises'
import { BlockList, isIP, isIPv6, type LookupFunction } from 'node:net'

/** IPv4 that is not globally reachable (IANA special-purpose registry, RFC 6890), multicast and reserved. */
const SHUT_4 = [
  ['0.0.0.0', 8],
  ['10.0.0.0', 8],
  ['100.64.0.0', 10],
  ['127.0.0.0', 8],
  ['169.254.0.0', 16],
  ['172.16.0.0', 12],
  ['192.0.0.0', 24],
  ['192.0.2.0', 24],
  ['192.88.99.0', 24],
  ['192.168.0.0', 16],
  ['198.18.0.0', 15],
  ['198.51.100.0', 24],
  ['203.0.113.0', 24],
  ['224.0.0.0', 3],
] as const
/** Within the global unicast of IPv6: tunnels that carry IPv4 inside, and documentation. */
const SHUT_6 = [
  ['2001::', 23],
  ['2001:db8::', 32],
  ['2002::', 16],
  ['3fff::', 20],
] as const

const shut = new BlockList()
for (const [net, bits] of SHUT_4) shut.addSubnet(net, bits)
for (const [net, bits] of SHUT_6) shut.addSubnet(net, bits, 'ipv6')
const global6 = new BlockList()
global6.addSubnet('2000::', 3, 'ipv6')

/** Of IPv6 only global unicast (2000::/3): mapped, translated, local and unique local addresses lie outside. */
export function isPublicAddress(address: string): boolean {
  if (isIPv6(address)) return global6.check(address, 'ipv6') && !shut.check(address, 'ipv6')
  return isIP(address) === 4 && !shut.check(address)
}

export class PrivateAddress extends Error {
  constructor(host: string) {
    super(`${host} is an address of a private network: nothing is sent there`)
    this.name = 'PrivateAddress'
  }
}

/** Resolves a name and hands over only what may be connected to: no second look-up comes between check and connection. */
export const lookupPublic: LookupFunction = (host, options, done) => {
  resolve(host, { all: true })
    .then((found) => {
      const open = found.filter(({ address }) => isPublicAddress(address))
      const [first] = open
      if (!first || open.length < found.length) done(new PrivateAddress(host), '')
      else if (options.all) done(null, open)
      else done(null, first.address, first.family)
    })
    .catch((cause: Error) => done(cause, ''))
}
