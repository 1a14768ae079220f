/** Asks for a file and reads it as text. Never settles when the person changes their mind. */
export function pickText(): Promise<string> {
  return new Promise((resolve, reject) => {
    const input = document.createElement('input')
    input.type = 'file'
    input.accept = '.json,application/json'
    input.onchange = () => {
      const file = input.files?.[0]
      if (file) file.text().then(resolve, reject)
    }
    input.click()
  })
}
