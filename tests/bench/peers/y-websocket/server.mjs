// y-websocket's own server as it is published: documents in memory. HOST and PORT by environment.
import '@y/websocket-server/server'
