import { Hash } from '@adonisjs/hash'
import { Scrypt } from '@adonisjs/hash/drivers/scrypt'

const hash = new Hash(new Scrypt({}))

/** The same scrypt that nuxt-auth-utils makes and verifies, for use outside a server. */
export const hashPassword = (password: string): Promise<string> => hash.make(password)
