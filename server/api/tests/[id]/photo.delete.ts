import { removePhoto } from '../../../services/test-photos'
import { files } from '../../../utils/files'
import { handle } from '../../../utils/handle'

export default handle('tests.removePhoto', ({ room, id }) => removePhoto(room, files(), id))
