import { readFileSync } from 'node:fs'

/**
 * When a process began, in the kernel's ticks since boot: with the number it names a process for good, as numbers come round again.
 * @param {number} pid
 * @returns {string | undefined} undefined when there is no such process, or it has ended and only waits to be collected
 */
export function beginningOf(pid) {
  try {
    // The name in parentheses may hold spaces: count fields behind it. The state is the first of them, the beginning the twentieth.
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ')
    return fields[0] === 'Z' ? undefined : fields[19]
  } catch {
    return undefined
  }
}

/**
 * The arguments of a process.
 * @param {number} pid
 * @returns {string[]} none when there is no such process
 */
export function argumentsOf(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').slice(0, -1)
  } catch {
    return []
  }
}
