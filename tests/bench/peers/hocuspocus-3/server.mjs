import { Database } from '@hocuspocus/extension-database'
import { Server } from '@hocuspocus/server'
import pg from 'pg'
import { serveHocuspocus } from '../serve-hocuspocus.mjs'

await serveHocuspocus({ Server, Database, pg, table: 'hocuspocus_3' })
