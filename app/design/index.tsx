import { Redirect } from 'expo-router'

export default function DesignIndex() {
  return <Redirect href="/design/stage" />
}
